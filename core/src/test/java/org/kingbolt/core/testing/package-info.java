/** What the tests of all modules share: random structures and their right answers. */
package org.kingbolt.core.testing;
