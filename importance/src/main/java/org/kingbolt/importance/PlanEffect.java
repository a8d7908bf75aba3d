package org.kingbolt.importance;

/**
 * What an item does to one variable of the compiled system.
 *
 * @param variable its index
 * @param sets whether it sets the unit's two sides; otherwise it multiplies the failing side by
 *     {@code failing}
 * @param working the unit's probability of working, or one minus the factor
 * @param failing the unit's probability of failing, or the factor
 */
record PlanEffect(int variable, boolean sets, double working, double failing) {}
