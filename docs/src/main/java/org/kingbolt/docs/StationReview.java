package org.kingbolt.docs;

/** The worked example that the build runs. */
public final class StationReview {
  private StationReview() {}

  /**
   * Prints the review.
   *
   * @param args not used
   */
  public static void main(String[] args) {
    System.out.println("Kingbolt");
  }
}
