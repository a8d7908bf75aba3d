/** Worked examples that use every module of the library. */
@NullMarked
package org.kingbolt.docs;

import org.jspecify.annotations.NullMarked;
