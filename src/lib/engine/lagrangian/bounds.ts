/** Bounds of the Lagrangian language; the message that refuses states the number found here. */
export const BOUNDS = {
  /** Characters of a Lagrangian. */
  lagrangianLength: 10_000,
  tokens: 4_000,
  /** Brackets inside brackets. */
  nesting: 64,
  /** Largest integer power of anything in the text. */
  power: 20,
  /** Largest power of one parameter after multiplying out. */
  parameterPower: 100,
  /** Fields in one monomial. */
  fieldDegree: 12,
  /** Derivative pairs in one monomial. */
  derivativePairs: 8,
  /** Digits of a number as typed. */
  digits: 40,
  /** Digits of a number that arises from numbers as typed. */
  resultDigits: 400,
  /** Unlike roots and powers of π in one number. */
  numberParts: 64,
  /** Largest n in n!. */
  factorial: 40,
  /** Monomials after multiplying out. */
  terms: 5_000,
  /** Monomials of one power of a sum, counted by the multinomial bound before anything is multiplied. */
  powerTerms: 1_000,
  /** Elementary steps (of about a microsecond each) that multiplying out the whole text may take. */
  steps: 30_000,
  fields: 40,
  parameters: 200,
  nameLength: 40,
  /** Momentum monomials in one vertex factor. */
  momentumTerms: 2_000,
} as const;
