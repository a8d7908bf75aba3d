package org.kingbolt.core;

import java.util.ArrayList;
import java.util.List;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Lexer.Word;

/** An open call in a structure's text. Either method returns null when a part is needed next. */
abstract class ParserCall {

  private static final String KINDS =
      "one of series, parallel, atLeast, network, ofPathSets, ofCutSets, capacityAtLeast,"
          + " withoutFailureRun, withoutFailureRunAround, dual, component";

  final Lexer lexer;

  ParserCall(Lexer lexer) {
    this.lexer = lexer;
  }

  static ParserCall of(Word kind, Lexer lexer) {
    return switch (kind.text()) {
      case GateStructure.SERIES, GateStructure.PARALLEL, GateStructure.AT_LEAST ->
          new GateCall(kind.text(), lexer);
      case RunStructure.LINE, RunStructure.CIRCLE -> new RunCall(kind.text(), lexer);
      case CapacityStructure.KIND -> new CapacityCall(lexer);
      case FamilyStructure.PATHS, FamilyStructure.CUTS ->
          new SetsCall(kind.text().equals(FamilyStructure.PATHS), lexer);
      case NetworkStructure.KIND -> new NetworkCall(lexer);
      case "dual" -> new DualCall(lexer);
      case "component" -> new ComponentCall(lexer);
      case "always" -> new ConstantCall(true, lexer);
      case "never" -> new ConstantCall(false, lexer);
      default -> throw kind.expected(KINDS);
    };
  }

  /** After the opening parenthesis. */
  abstract @Nullable Structure begin();

  /** After a part. */
  abstract @Nullable Structure accept(Structure part);

  /** Reads a comma (true) or the closing parenthesis (false). */
  final boolean more() {
    return more(')', "a comma or a closing parenthesis");
  }

  final boolean more(char closing, String what) {
    Word word = lexer.peek();
    if (!word.isMark(',') && !word.isMark(closing)) {
      throw word.expected(what);
    }
    return lexer.next().isMark(',');
  }

  /** Whether the call closes at once; the parenthesis is then read. */
  final boolean closesEmpty() {
    if (!lexer.peek().isMark(')')) {
      return false;
    }
    lexer.next();
    return true;
  }

  final int count(String what) {
    Word word = lexer.peek();
    long value = lexer.number(what);
    if (value != (int) value) {
      throw word.expected(what + " below 2147483648");
    }
    lexer.mark(',', "a comma");
    return (int) value;
  }

  private static final class GateCall extends ParserCall {
    private final String kind;
    private int k;
    private final List<Structure> parts = new ArrayList<>();

    GateCall(String kind, Lexer lexer) {
      super(lexer);
      this.kind = kind;
    }

    @Override
    @Nullable Structure begin() {
      if (kind.equals(GateStructure.AT_LEAST)) {
        k = count("the number of parts that must work");
      }
      return closesEmpty() ? whole() : null;
    }

    @Override
    @Nullable Structure accept(Structure part) {
      parts.add(part);
      return more() ? null : whole();
    }

    private Structure whole() {
      return switch (kind) {
        case GateStructure.SERIES -> Structure.series(parts);
        case GateStructure.PARALLEL -> Structure.parallel(parts);
        default -> Structure.atLeast(k, parts);
      };
    }
  }

  private static final class RunCall extends ParserCall {
    private final String kind;
    private int k;
    private final List<Structure> parts = new ArrayList<>();

    RunCall(String kind, Lexer lexer) {
      super(lexer);
      this.kind = kind;
    }

    @Override
    @Nullable Structure begin() {
      k = count("the length of the run");
      return null;
    }

    @Override
    @Nullable Structure accept(Structure part) {
      parts.add(part);
      return more() ? null : RunStructure.described(k, parts, kind.equals(RunStructure.CIRCLE));
    }
  }

  private static final class CapacityCall extends ParserCall {
    private long demand;
    private final List<Structure> parts = new ArrayList<>();
    private final List<Long> capacities = new ArrayList<>();

    CapacityCall(Lexer lexer) {
      super(lexer);
    }

    @Override
    @Nullable Structure begin() {
      demand = lexer.number("the demand");
      lexer.mark(',', "a comma");
      return null;
    }

    @Override
    @Nullable Structure accept(Structure part) {
      parts.add(part);
      lexer.mark(':', "a colon and the capacity");
      capacities.add(lexer.number("the capacity, a whole number"));
      return more() ? null : CapacityStructure.described(demand, parts, capacities);
    }
  }

  private static final class SetsCall extends ParserCall {
    private final boolean paths;
    private final List<List<Structure>> sets = new ArrayList<>();
    private List<Structure> set = new ArrayList<>();

    SetsCall(boolean paths, Lexer lexer) {
      super(lexer);
      this.paths = paths;
    }

    @Override
    @Nullable Structure begin() {
      lexer.mark('{', "a set in braces");
      return null;
    }

    @Override
    @Nullable Structure accept(Structure part) {
      set.add(part);
      if (more('}', "a comma or a closing brace")) {
        return null;
      }
      sets.add(set);
      set = new ArrayList<>();
      if (more()) {
        lexer.mark('{', "a set in braces");
        return null;
      }
      return FamilyStructure.describedByParts(paths, sets);
    }
  }

  private static final class DualCall extends ParserCall {
    DualCall(Lexer lexer) {
      super(lexer);
    }

    @Override
    @Nullable Structure begin() {
      return null;
    }

    @Override
    Structure accept(Structure part) {
      lexer.mark(')', "a closing parenthesis");
      return part.dual();
    }
  }

  private static final class ComponentCall extends ParserCall {
    ComponentCall(Lexer lexer) {
      super(lexer);
    }

    @Override
    Structure begin() {
      String name = lexer.name("the component's name");
      lexer.mark(')', "a closing parenthesis");
      return Structure.component(name);
    }

    @Override
    Structure accept(Structure part) {
      throw new AssertionError("a component has no parts");
    }
  }

  private static final class ConstantCall extends ParserCall {
    private final boolean works;

    ConstantCall(boolean works, Lexer lexer) {
      super(lexer);
      this.works = works;
    }

    @Override
    Structure begin() {
      lexer.mark(')', "a closing parenthesis");
      return ConstantStructure.of(works);
    }

    @Override
    Structure accept(Structure part) {
      throw new AssertionError("a constant has no parts");
    }
  }
}
