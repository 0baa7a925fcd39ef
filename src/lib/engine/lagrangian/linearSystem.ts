import { divide, isZero, multiply, ONE, type Rational, subtract, ZERO } from '../exact/rational.ts';
import { isZeroLinear, type Linear, scaleLinear, subtractLinear } from './spacetime.ts';

/** Σ coefficient × unknown = value. */
interface Equation {
  readonly coefficients: ReadonlyMap<string, Rational>;
  readonly value: Linear;
}

/** Operations on fractions that one system may take; equations beyond are left out. */
const BUDGET = 40_000;

/**
 * Linear equations between named unknowns, solved exactly by elimination as they come in.
 * Right-hand sides are numbers that may depend on ε.
 */
export class LinearSystem {
  private readonly pivots = new Map<string, Equation>();
  private spent = 0;

  private subtract(a: Equation, b: Equation, times: Rational): Equation {
    const coefficients = new Map(a.coefficients);
    for (const [name, value] of b.coefficients) {
      const rest = subtract(coefficients.get(name) ?? ZERO, multiply(times, value));
      if (isZero(rest)) coefficients.delete(name);
      else coefficients.set(name, rest);
    }
    this.spent += b.coefficients.size + 1;
    return { coefficients, value: subtractLinear(a.value, scaleLinear(b.value, times)) };
  }

  /** Adds an equation. False when it contradicts those before it (it is then left out). */
  add(coefficients: ReadonlyMap<string, Rational>, value: Linear): boolean {
    if (this.spent > BUDGET) return true;
    let equation: Equation = { coefficients: new Map([...coefficients].filter(([, c]) => !isZero(c))), value };
    for (const name of [...equation.coefficients.keys()]) {
      const pivot = this.pivots.get(name);
      const times = equation.coefficients.get(name);
      if (pivot && times) equation = this.subtract(equation, pivot, times);
    }
    const [first] = equation.coefficients;
    if (!first) return isZeroLinear(equation.value);
    const [name, leading] = first;
    const scaled = this.scale(equation, divide(ONE, leading));
    for (const [other, pivot] of this.pivots) {
      const times = pivot.coefficients.get(name);
      if (times) this.pivots.set(other, this.subtract(pivot, scaled, times));
    }
    this.pivots.set(name, scaled);
    return true;
  }

  private scale({ coefficients, value }: Equation, by: Rational): Equation {
    return {
      coefficients: new Map([...coefficients].map(([name, c]) => [name, multiply(c, by)])),
      value: scaleLinear(value, by),
    };
  }

  /** The unknowns that the equations fix. */
  solution(): Map<string, Linear> {
    const fixed = [...this.pivots].filter(([, { coefficients }]) => coefficients.size === 1);
    return new Map(fixed.map(([name, { value }]) => [name, value]));
  }
}
