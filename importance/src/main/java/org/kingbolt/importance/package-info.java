/**
 * What matters in a system: importance measures of its components, as rankings.
 *
 * <p>Begin with {@link org.kingbolt.importance.Importance}; every measure is a {@link
 * org.kingbolt.importance.Ranking}. Results support a qualified engineer's judgement and never
 * replace codes, standards and licensed practice.
 *
 * <p>The package may use {@code org.kingbolt.core}, Guava and commons-math3, and not {@code
 * org.kingbolt.bounds}; it does no input or output and keeps no global state. Nothing accepts or
 * returns null.
 */
@NullMarked
package org.kingbolt.importance;

import org.jspecify.annotations.NullMarked;
