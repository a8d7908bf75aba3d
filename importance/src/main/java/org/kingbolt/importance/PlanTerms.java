package org.kingbolt.importance;

/** The alternatives of every step whatever is decided elsewhere, and their terms at a reference. */
final class PlanTerms {

  private final PlanAlternative[][] menus;
  private final double[][] values;

  PlanTerms(PlanAlternative[][] menus, PlanReference reference) {
    this.menus = menus;
    this.values = new double[menus.length][];
    for (int at = 0; at < menus.length; at++) {
      values[at] = new double[menus[at].length];
      for (int choice = 0; choice < menus[at].length; choice++) {
        PlanAlternative alternative = menus[at][choice];
        values[at][choice] = reference.term(at, alternative.working(), alternative.failing());
      }
    }
  }

  int count() {
    return menus.length;
  }

  int choices(int at) {
    return menus[at].length;
  }

  double value(int at, int choice) {
    return values[at][choice];
  }

  long cost(int at, int choice, int resource) {
    return menus[at][choice].cost()[resource];
  }
}
