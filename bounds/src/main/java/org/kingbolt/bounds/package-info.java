/**
 * Two-sided bounds on the reliability of coherent systems: intervals that hold, with the assumption
 * under which they do.
 *
 * <p>Begin with {@link org.kingbolt.bounds.Bounds}; every answer is an {@link
 * org.kingbolt.bounds.Interval}. Results support a qualified engineer's judgement and never replace
 * codes, standards and licensed practice.
 *
 * <p>The package may use {@code org.kingbolt.core}, Guava and commons-math3; it does no input or
 * output and keeps no global state. Nothing accepts or returns null.
 */
@NullMarked
package org.kingbolt.bounds;

import org.jspecify.annotations.NullMarked;
