package org.kingbolt.core;

import java.util.List;

/** What a {@link Fold} does at a component and at an operator. */
interface FoldStep<T> {

  T component(String name);

  /** Also called for the two constants, without parts. */
  T operator(Structure operator, List<T> parts);
}
