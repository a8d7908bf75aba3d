package org.kingbolt.core;

import java.util.ArrayDeque;
import java.util.Deque;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Lexer.Word;

/** Reads a structure's text, with a stack of the calls that are still open. For one thread. */
final class StructureParser {

  private final Lexer lexer;
  private final Deque<ParserCall> open = new ArrayDeque<>();

  StructureParser(String text) {
    this.lexer = new Lexer(text);
  }

  Structure parse() {
    while (true) {
      Structure done = begin();
      while (done != null) {
        if (open.isEmpty()) {
          if (lexer.peek().kind() != Lexer.Kind.END) {
            throw lexer.peek().expected("the end of the text");
          }
          return done;
        }
        done = open.getFirst().accept(done);
        if (done != null) {
          open.pop();
        }
      }
    }
  }

  /** Reads a component or opens a call; null when the call needs a part first. */
  private @Nullable Structure begin() {
    Word word = lexer.peek();
    if (!word.isName()) {
      throw word.expected("a component or a structure");
    }
    lexer.next();
    if (word.kind() == Lexer.Kind.QUOTED || !lexer.peek().isMark('(')) {
      if (Check.isInvisible(word.text())) {
        throw word.expected("a name with at least one visible character");
      }
      return Structure.component(word.text());
    }
    ParserCall call = ParserCall.of(word, lexer);
    lexer.next();
    Structure whole = call.begin();
    if (whole == null) {
      open.push(call);
    }
    return whole;
  }
}
