/** Checks against published values and published networks; docs/checks.md lists them all. */
package org.kingbolt.core.published;
