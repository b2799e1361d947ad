/** What a link leaves unsaid, as it stands in an address. */
export interface OwnTerms {
  period: string;
  minYears: string;
  minCoverage: string;
}
