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

/** Nodes and edges together of a graph written as GEXF, which graphology holds as objects: seconds. */
export const gexfElements = 250_000;

/** Seconds a route may take by estimate before the census leaves it out (`--budget`). */
export const defaultRouteSeconds = 60;

/** Seconds the cheapest route to the polynomial may take by estimate when the others are too dear. */
export const polynomialPatienceSeconds = 3600;

/** Bytes of tables a command may allocate by estimate (`--memory`). */
export const defaultMemoryBytes = 2 * 1024 ** 3;

/** Seconds by estimate in which the polynomial is had besides a listing, as a check of it. */
export const quickPolynomialSeconds = 5;

/** Regions times hyperplanes times coordinates up to which the census looks at each region alone. */
export const regionCheckEntries = 3_000_000;

/** Regions squared times coordinates up to which every vertex is compared with every other. */
export const extremeCheckSteps = 100_000_000;

/** Columns of the terminal page. */
export const pageColumns = 80;

/** Regions a second that estimates count on; listing is seldom slower. */
export const regionsListedPerSecond = 1_500_000;

/** Faces a second that estimates count on. */
export const facesListedPerSecond = 2_500_000;

/** Seconds for each cover walked when faces are counted by Moebius values ... */
export const secondsPerIntervalStep = 1.2e-8;

/** ... and where the tables of the lattice are far larger than the processor's cache. */
export const secondsPerDistantStep = 4e-8;

/** Flats from which they are. */
export const distantFlats = 500_000;

/** Bytes for each Int32 word of a listed row, with the room tables leave to grow. */
export const bytesPerListedWord = 11;

/** Seconds by estimate in which a further route is run though two have been. */
export const quickRouteSeconds = 5;

/** Seconds by estimate in which lattice points are counted one line at a time, as a check. */
export const directCountSeconds = 0.5;

/** Faces of the surface of a zonotope in space: seconds, and files of some 100 MB. */
export const surfaceFaces = 250_000;

/** Tiles that a list may have: about a gigabyte of text. */
export const listedTiles = 10_000_000;

/** Faces of a solid, sides of a polygon or tiles that a picture holds: past it, ink alone. */
export const drawnFaces = 10_000;

/** Seconds the cheapest route to volume and Ehrhart polynomial may take where these are asked for. */
export const measurePatienceSeconds = 900;

/** Blocks of a tiling in space that a picture holds: each is compared with each for the order of depth. */
export const drawnBlocks = 500;
