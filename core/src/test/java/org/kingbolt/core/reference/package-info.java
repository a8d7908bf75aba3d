/** Comparison with general-purpose libraries for graphs and for propositional logic. */
package org.kingbolt.core.reference;
