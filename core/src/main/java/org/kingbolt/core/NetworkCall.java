package org.kingbolt.core;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.jspecify.annotations.Nullable;
import org.kingbolt.core.Lexer.Word;

/** A network in a structure's text: its items mirror the methods of {@link NetworkBuilder}. */
final class NetworkCall extends ParserCall {

  private static final String ITEMS =
      "one of link, arc, perfectLink, perfectArc, node, connecting, connectingAll,"
          + " reachingAllFrom";

  private final NetworkBuilder network = new NetworkBuilder();

  /** The item whose component comes next. */
  private String pending = "";

  private String pendingNode = "";

  NetworkCall(Lexer lexer) {
    super(lexer);
  }

  @Override
  @Nullable Structure begin() {
    return item();
  }

  @Override
  @Nullable Structure accept(Structure part) {
    if (pending.equals("node")) {
      network.node(pendingNode, part);
    } else {
      lexer.mark(',', "a comma");
      String from = lexer.name("a node's name");
      lexer.mark(',', "a comma");
      String to = lexer.name("a node's name");
      if (pending.equals("link")) {
        network.link(part, from, to);
      } else {
        network.arc(part, from, to);
      }
    }
    lexer.mark(')', "a closing parenthesis");
    lexer.mark(',', "a comma and the next item, such as connecting(...)");
    return item();
  }

  /** Reads items until one needs a component, or until the question closes the network. */
  private @Nullable Structure item() {
    while (true) {
      Word item = lexer.peek();
      lexer.name(ITEMS);
      lexer.mark('(', "an opening parenthesis");
      switch (item.text()) {
        case "link", "arc" -> {
          pending = item.text();
          return null;
        }
        case "node" -> {
          pending = item.text();
          Word node = lexer.peek();
          pendingNode = lexer.name("a node's name");
          requireNew(node);
          lexer.mark(',', "a comma");
          return null;
        }
        case "perfectLink", "perfectArc" -> perfect(item.text().equals("perfectArc"));
        case "connecting" -> {
          return closed(network.connecting(names()));
        }
        case "connectingAll" -> {
          lexer.mark(')', "a closing parenthesis");
          return closed(network.connectingAll());
        }
        case "reachingAllFrom" -> {
          String source = lexer.name("a node's name");
          lexer.mark(')', "a closing parenthesis");
          return closed(network.reachingAllFrom(source));
        }
        default -> throw item.expected(ITEMS);
      }
    }
  }

  private void requireNew(Word node) {
    Optional<String> before = network.dependence(node.text());
    if (before.isPresent()) {
      throw node.expected(
          "a node that is described once (this one already depends on "
              + before.get()
              + "; a node that needs both takes series of the two)");
    }
  }

  private void perfect(boolean arc) {
    String from = lexer.name("a node's name");
    lexer.mark(',', "a comma");
    String to = lexer.name("a node's name");
    lexer.mark(')', "a closing parenthesis");
    lexer.mark(',', "a comma and the next item, such as connecting(...)");
    if (arc) {
      network.perfectArc(from, to);
    } else {
      network.perfectLink(from, to);
    }
  }

  private String[] names() {
    List<String> names = new ArrayList<>();
    do {
      names.add(lexer.name("a node's name"));
    } while (more());
    return names.toArray(new String[0]);
  }

  private Structure closed(Structure whole) {
    lexer.mark(')', "a closing parenthesis");
    return whole;
  }
}
