// Every bound on what is read, kept or written, with its unit in the name. What would pass one is
// estimated first and refused with a LimitError before anything is allocated.

/** Digits a number may grow beyond the digits written, by exponents such as 1e500. */
export const expandedDigits = 10_000;

/** Depth of parentheses in one number. */
export const parenthesisDepth = 100;

/** Trial divisors tried to split a number under a square root into square and square-free part. */
export const squareFreeTrialDivisor = 1_000_000;

/** Entries (normals times coordinates) that a made family may have. */
export const familyEntries = 1_000_000;

/** Nodes and edges together of a graph written as GEXF, which graphology holds as objects. */
export const gexfElements = 1_000_000;
