package org.kingbolt.core.testing;

import java.math.BigInteger;
import java.util.List;
import java.util.Set;
import java.util.stream.IntStream;
import org.kingbolt.core.MinimalSets;
import org.kingbolt.core.Probabilities;
import org.kingbolt.core.Structure;

/** Asks for a few of very many minimal sets, to be run in a small heap. */
public final class FewOfMany {

  private FewOfMany() {}

  /**
   * Prints how many of 20 out of 40 there are, and that ten were streamed and ten searched.
   *
   * @param args none
   */
  public static void main(String[] args) {
    String[] names = IntStream.range(0, 40).mapToObj(i -> "u" + i).toArray(String[]::new);
    MinimalSets sets = Structure.atLeast(20, names).compile().minimalPathSets();
    BigInteger count = sets.count();
    List<Set<String>> streamed = sets.stream().limit(10).toList();
    List<Set<String>> searched = sets.mostProbable(10, Probabilities.all(0.9));
    System.out.println(count + " " + streamed.size() + " " + searched.size());
  }
}
