/**
 * The engine: ordered decision diagrams of monotone structure functions, stored in primitive
 * arrays, with the builders that make them and the linear passes that read them.
 *
 * <p>Reading order: {@link org.kingbolt.core.diagram.Diagram} is the read-only view that other
 * modules, and people who write their own algorithms, work on; {@link
 * org.kingbolt.core.diagram.Evaluation} and {@link org.kingbolt.core.diagram.StateCounts} show how
 * a question becomes one scan of its arrays; {@link org.kingbolt.core.diagram.MinimalSolutions}
 * turns it into a {@link org.kingbolt.core.diagram.SetDiagram} of minimal path or cut sets. The
 * builders ({@link org.kingbolt.core.diagram.Composer}, {@link
 * org.kingbolt.core.diagram.Templates}, {@link org.kingbolt.core.diagram.FrontierSweep} and their
 * kin) are public only because {@code org.kingbolt.core} calls them; they may change from release
 * to release.
 *
 * <p>The package knows variables as numbers from 0 up and nothing of names, structures or budgets:
 * it may use the JDK and nothing above it. Long work is reported to a {@link
 * org.kingbolt.core.diagram.WorkMeter} that the caller provides.
 */
@NullMarked
package org.kingbolt.core.diagram;

import org.jspecify.annotations.NullMarked;
