/** Spans that are believed, in metres: the bounds of the contract and of the database (common practice, no source). */
export const shortestSpanM = 5;
export const longestSpanM = 5000;

/** Ends of parts closer than this are taken to meet: the digitising noise of GIS layers (own model). */
export const meetingDistanceM = 1;
/** Spans of a divided line keep within the bounds even when an end moves to the place where parts meet. */
export const shortestDividedSpanM = shortestSpanM + meetingDistanceM;
export const longestDividedSpanM = longestSpanM - meetingDistanceM;
