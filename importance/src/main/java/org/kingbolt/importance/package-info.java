/** Importance measures for the components of coherent systems. */
@NullMarked
package org.kingbolt.importance;

import org.jspecify.annotations.NullMarked;
