/** Every bound of the product, in one place: the message that refuses states the number found here. */
export const LIMITS = {
  /** Characters of a Lagrangian. */
  lagrangianLength: 10_000,
  tokens: 4_000,
  /** Brackets inside brackets. */
  nesting: 64,
  /** Largest integer power of anything in the text. */
  power: 20,
  /** Fields in one monomial. */
  fieldDegree: 12,
  /** Derivative pairs in one monomial. */
  derivativePairs: 8,
  digits: 40,
  /** Largest n in n!. */
  factorial: 40,
  /** Monomials after multiplying out. */
  terms: 5_000,
  fields: 40,
  parameters: 200,
  nameLength: 40,
  /** External legs of a correlator. */
  legs: 12,
  /** Vertices of one diagram. */
  vertices: 24,
  diagramLines: 64,
  bodyBytes: 1_000_000,
  jsonDepth: 64,
  /** Visitors: estimated classes, seconds, runs an hour and address, hours a result is kept. */
  visitor: { classes: 2_000, seconds: 5, perHour: 20, keepHours: 24 },
  /** Signed-in people: classes of one expansion, seconds, running jobs. */
  member: { classes: 500_000, seconds: 600, running: 4 },
  job: { heapMiB: 1_024, seconds: 900 },
} as const;
