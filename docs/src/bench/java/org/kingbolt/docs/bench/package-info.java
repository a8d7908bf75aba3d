/** Measures how long whole questions take, beside general-purpose libraries. */
@NullMarked
package org.kingbolt.docs.bench;

import org.jspecify.annotations.NullMarked;
