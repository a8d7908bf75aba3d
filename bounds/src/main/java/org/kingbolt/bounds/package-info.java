/** Bounds on the reliability of coherent systems. */
@NullMarked
package org.kingbolt.bounds;

import org.jspecify.annotations.NullMarked;
