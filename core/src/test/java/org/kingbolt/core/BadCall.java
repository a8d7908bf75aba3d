package org.kingbolt.core;

import static org.junit.jupiter.api.Assertions.assertThrowsExactly;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.function.Executable;

/** A call that must be refused: with which exception, and what its message must say. */
record BadCall(
    String name, Class<? extends Exception> refusal, Executable call, List<String> words) {

  static BadCall illegal(String name, Executable call, String... words) {
    return new BadCall(name, IllegalArgumentException.class, call, List.of(words));
  }

  static BadCall incoherent(String name, Executable call, String... words) {
    return new BadCall(name, NotCoherentException.class, call, List.of(words));
  }

  static BadCall isNull(String name, Executable call, String... words) {
    String[] all = Arrays.copyOf(words, words.length + 1);
    all[words.length] = "null";
    return new BadCall(name, NullPointerException.class, call, List.of(all));
  }

  void check() {
    String message = assertThrowsExactly(refusal, call).getMessage();
    for (String word : words) {
      assertTrue(message.contains(word), () -> "no \"" + word + "\" in: " + message);
    }
  }

  @Override
  public String toString() {
    return name;
  }
}
