package org.kingbolt.core.testing;

import net.jqwik.api.lifecycle.AroundPropertyHook;
import net.jqwik.api.lifecycle.PropagationMode;
import net.jqwik.api.lifecycle.PropertyExecutionResult;
import net.jqwik.api.lifecycle.PropertyExecutor;
import net.jqwik.api.lifecycle.PropertyLifecycleContext;

/**
 * Gives every property that names no seed the seed in the system property {@code
 * kingbolt.test.seed}, so that each run of the build tries the same cases. The value {@code random}
 * leaves the choice to jqwik.
 */
public final class FixedSeed implements AroundPropertyHook {
  @Override
  public PropagationMode propagateTo() {
    return PropagationMode.ALL_DESCENDANTS;
  }

  @Override
  public PropertyExecutionResult aroundProperty(
      PropertyLifecycleContext context, PropertyExecutor property) {
    String seed = System.getProperty("kingbolt.test.seed", "1");
    if (!seed.equals("random") && context.attributes().seed().isEmpty()) {
      context.attributes().setSeed(seed);
    }
    return property.execute();
  }
}
