import { fromRational, IMAGINARY, powerOfPi } from '../exact/number.ts';
import { format, isInteger, ONE, rational } from '../exact/rational.ts';
import { Arithmetic, sizeOf } from './arithmetic.ts';
import type { Node, Summand } from './ast.ts';
import { conjugateTermsMissing } from './conjugates.ts';
import type { Span } from './model.ts';
import {
  conjugateMonomial,
  constant,
  fieldMonomial,
  type Monomial,
  minusOne,
  OPERATOR,
  type Polynomial,
  parameterMonomial,
  unit,
} from './monomial.ts';
import { PowerRule } from './powers.ts';
import type { Source } from './source.ts';

/** Which names are fields, and which names are complex. */
export interface Names {
  readonly fields: ReadonlySet<string>;
  readonly complex: ReadonlySet<string>;
}

/** Multiplies out an expression. Exact; every bound is checked before the work it bounds. */
export class Evaluator {
  readonly arithmetic: Arithmetic;
  private readonly powers: PowerRule;

  constructor(
    private readonly source: Source,
    private readonly names: Names,
  ) {
    this.arithmetic = new Arithmetic(source);
    this.powers = new PowerRule(this.arithmetic);
  }

  /** The value of one summand with its sign. */
  summand(item: Summand & { node: Node }): Polynomial {
    const value = this.value(item.node);
    return item.sign === 1 ? value : this.arithmetic.scale(value, minusOne, item);
  }

  value(node: Node): Polynomial {
    switch (node.is) {
      case 'number':
        return node.value.num === 0n ? [] : [constant(fromRational(node.value))];
      case 'name':
        return [this.symbol(node.name)];
      case 'imaginary':
        return [constant(IMAGINARY)];
      case 'pi':
        return [constant(powerOfPi(ONE))];
      case 'group':
        return this.value(node.node);
      case 'negative':
        return this.arithmetic.scale(this.value(node.node), minusOne, node);
      case 'sum':
        return this.sum(node.items, node);
      case 'product':
        return this.product(node);
      case 'fraction':
        return this.arithmetic.multiply(this.value(node.above), this.inverse(node.below), node);
      case 'power':
        return this.power(node);
      case 'conjugate':
        return this.conjugate(this.value(node.node));
      case 'root':
        return this.powers.root(this.value(node.node), rational(1, node.degree), node);
      case 'factorial':
        return [constant(this.powers.factorial(this.value(node.node), node.step, node))];
      case 'derivative':
        return this.derivative(node);
      case 'operator':
        return [parameterMonomial(OPERATOR, rational(node.count))];
      case 'modulus':
        throw this.source.fault(
          'unsupported',
          'The modulus alone is not polynomial; only even powers such as |phi|^2 are.',
          node,
        );
    }
  }

  private symbol(name: string): Monomial {
    return this.names.fields.has(name) ? fieldMonomial({ field: name, conjugate: false }) : parameterMonomial(name);
  }

  conjugate(value: Polynomial): Polynomial {
    return value.map((m) => conjugateMonomial(m, this.names.complex));
  }

  private inverse(node: Node): Polynomial {
    return this.powers.inverse(this.value(node), node, 'Division by zero, or the inverse');
  }

  /** A sum in brackets: all its terms must carry the same free indices. */
  private sum(items: readonly Summand[], span: Span): Polynomial {
    const terms: Monomial[] = [];
    for (const item of items) {
      if (item.node === 'hc') terms.push(...this.hermitianConjugate(terms, item));
      else {
        const value = this.summand({ ...item, node: item.node });
        this.refuseUnlikeIndices(terms, value, item);
        terms.push(...value);
      }
    }
    this.arithmetic.charge(
      terms.reduce((sum, m) => sum + 1 + sizeOf(m) / 4, 0),
      span,
    );
    return this.arithmetic.merge(terms, span);
  }

  private refuseUnlikeIndices(terms: readonly Monomial[], value: Polynomial, span: Span): void {
    const signature = (m: Monomial): string =>
      m.open
        .map(({ index }) => index ?? '')
        .sort()
        .join(' ');
    const [first] = terms;
    if (first && value.some((m) => signature(m) !== signature(first)))
      throw this.source.fault(
        'syntax',
        'The terms of this sum carry different free derivatives; each must be contracted, as in (d phi)^2.',
        span,
      );
  }

  /** What "+ h.c." adds to the terms before it: the conjugate of each that is not matched by its own conjugate already. */
  hermitianConjugate(terms: readonly Monomial[], span: Span): Polynomial {
    this.arithmetic.charge(
      terms.reduce((sum, m) => sum + 4 + sizeOf(m) / 2, 0),
      span,
    );
    const missing = conjugateTermsMissing(terms, this.names.complex);
    if (missing.length === 0)
      throw this.source.fault(
        'syntax',
        'Everything before "h.c." is hermitian already, so it is not clear what it adds; leave it out or declare what is complex.',
        span,
      );
    return missing;
  }

  /** Factors from left to right; a □ that waits acts on the product of all that follows it. */
  private product(node: Node & { is: 'product' }): Polynomial {
    let result: Polynomial = [unit];
    const contracted = new Set<string>();
    for (let k = 0; k < node.factors.length; k++) {
      const factor = node.factors[k]!;
      const span = { start: node.start, end: factor.node.end };
      const value = factor.by === '/' ? this.inverse(factor.node) : this.value(factor.node);
      this.refuseRepeatedIndex(result, value, contracted, span);
      const waits = value.some((m) => m.powers.some(([name]) => name === OPERATOR));
      if (waits && k + 1 < node.factors.length) {
        const rest = this.product({ ...node, factors: node.factors.slice(k + 1) });
        return this.arithmetic.multiply(result, this.operate(value, rest, span), node);
      }
      result = this.arithmetic.multiply(result, value, span);
    }
    return result;
  }

  private refuseRepeatedIndex(left: Polynomial, right: Polynomial, contracted: Set<string>, span: Span): void {
    const named = (value: Polynomial): string[] =>
      (value[0]?.open ?? []).flatMap(({ index }) => (index === null ? [] : [index]));
    const known = named(left);
    for (const index of named(right)) {
      if (contracted.has(index))
        throw this.source.fault(
          'syntax',
          `The index ${index} stands more than twice in this product; give the second pair another index.`,
          span,
        );
      if (known.includes(index)) contracted.add(index);
    }
  }

  /** Applies every □^n in `operator` to `operand`. */
  private operate(operator: Polynomial, operand: Polynomial, span: Span): Polynomial {
    const terms = operator.flatMap((m) => {
      const power = m.powers.find(([name]) => name === OPERATOR)?.[1];
      const rest: Monomial = { ...m, powers: m.powers.filter(([name]) => name !== OPERATOR) };
      let value = operand;
      for (let n = Number(power?.num ?? 0n); n > 0; n--) value = this.box(value, span);
      return this.arithmetic.multiply([rest], value, span);
    });
    return this.arithmetic.merge(terms, span);
  }

  /** □ of a value: an index of its own that cannot meet another. */
  private box(value: Polynomial, span: Span): Polynomial {
    const index = '□';
    return this.arithmetic.derive(this.arithmetic.derive(value, index, span), index, span);
  }

  private derivative(node: Node & { is: 'derivative' }): Polynomial {
    let value = this.value(node.node);
    if (value.some((m) => m.powers.some(([name]) => name === OPERATOR)))
      throw this.source.fault('syntax', 'A derivative cannot act on an operator that waits.', node);
    if (!value.some((m) => m.factors.length > 0))
      throw this.source.fault('syntax', 'This derivative acts on no field.', node);
    let { count } = node;
    for (; count >= 2; count -= 2) value = this.box(value, node);
    return count === 1 ? this.arithmetic.derive(value, node.index, node) : value;
  }

  private power(node: Node & { is: 'power' }): Polynomial {
    const exponent = this.powers.rationalOf(this.value(node.exponent), 'A power', node.exponent);
    if (node.base.is !== 'modulus') return this.powers.raise(this.value(node.base), exponent, node);
    if (!isInteger(exponent) || exponent.num % 2n !== 0n || exponent.num < 0n)
      throw this.source.fault(
        'unsupported',
        `Only even powers of a modulus are polynomial, not ${format(exponent)}.`,
        node,
      );
    const inner = this.value(node.base.node);
    const square = this.arithmetic.multiply(this.conjugate(inner), inner, node);
    return this.powers.raise(square, rational(exponent.num / 2n), node);
  }
}
