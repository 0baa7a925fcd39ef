import { format } from '../exact/rational.ts';
import type { FactorNode, Node, Summand } from './ast.ts';
import { nameLatex } from './symbols.ts';

const BRACKETS: Readonly<Record<string, readonly [string, string]>> = {
  '(': ['\\left(', '\\right)'],
  '[': ['\\left[', '\\right]'],
  '{': ['{', '}'],
};

function rationalLatex(node: Node & { is: 'number' }): string {
  const { num, den } = node.value;
  return den === 1n ? `${num}` : `\\tfrac{${num}}{${den}}`;
}

/** A base that can carry a power as it stands. */
function based(node: Node): string {
  const latex = nodeLatex(node);
  const simple = node.is === 'name' || node.is === 'pi' || node.is === 'imaginary' || node.is === 'modulus';
  const bracketed = node.is === 'group' && node.open !== '{';
  const whole = node.is === 'number' && node.value.den === 1n;
  return simple || bracketed || whole || node.is === 'factorial' ? latex : `\\left(${latex}\\right)`;
}

function derivativeLatex(node: Node & { is: 'derivative' }): string {
  const operand = nodeLatex(node.node);
  if (node.index !== null) return `\\partial_{${nameLatex(node.index)}}${spaced(operand)}`;
  if (node.count === 1) return `\\partial${spaced(operand)}`;
  return `\\partial^{${node.count}}${spaced(operand)}`;
}

const spaced = (latex: string): string => (/^[A-Za-z]/.test(latex) ? ` ${latex}` : latex);

/** Factors side by side; what follows a ÷ goes below a fraction bar, read from left to right. */
function productLatex(factors: readonly FactorNode[]): string {
  let latex = '';
  for (const { by, node } of factors) {
    const next = node.is === 'sum' ? `\\left(${nodeLatex(node)}\\right)` : nodeLatex(node);
    if (by === '/') latex = `\\frac{${latex}}{${next}}`;
    else if (latex === '') latex = next;
    else latex += /^[\d-]/.test(next) ? ` \\cdot ${next}` : `\\,${next}`;
  }
  return latex;
}

/** An expression typeset as it was typed. */
export function nodeLatex(node: Node): string {
  switch (node.is) {
    case 'number':
      return rationalLatex(node);
    case 'name':
      return nameLatex(node.name);
    case 'imaginary':
      return 'i';
    case 'pi':
      return '\\pi';
    case 'sum':
      return summandsLatex(node.items);
    case 'product':
      return productLatex(node.factors);
    case 'negative':
      return `\\left(-${nodeLatex(node.node)}\\right)`;
    case 'power':
      return `${based(node.base)}^{${exponentLatex(node.exponent)}}`;
    case 'conjugate':
      return `${based(node.node)}^{*}`;
    case 'modulus':
      return `\\left|${nodeLatex(node.node)}\\right|`;
    case 'root':
      return node.degree === 2 ? `\\sqrt{${nodeLatex(node.node)}}` : `\\sqrt[${node.degree}]{${nodeLatex(node.node)}}`;
    case 'factorial':
      return `${based(node.node)}${'!'.repeat(node.step)}`;
    case 'fraction':
      return `\\frac{${nodeLatex(node.above)}}{${nodeLatex(node.below)}}`;
    case 'derivative':
      return derivativeLatex(node);
    case 'operator':
      return node.count === 1 ? '\\partial^{2}' : `\\partial^{${2 * node.count}}`;
    case 'group': {
      const [open, close] = BRACKETS[node.open]!;
      return `${open}${nodeLatex(node.node)}${close}`;
    }
  }
}

const exponentLatex = (node: Node): string =>
  node.is === 'number' ? format(node.value) : nodeLatex(node.is === 'group' ? node.node : node);

/** Summands with their signs, typeset as typed. */
export function summandsLatex(items: readonly Summand[]): string {
  return items
    .map(({ sign, node }, k) => {
      const latex = node === 'hc' ? '\\text{h.c.}' : nodeLatex(node);
      const mark = sign === -1 ? '-' : k === 0 ? '' : '+';
      return k === 0 ? `${mark}${latex}` : ` ${mark} ${latex}`;
    })
    .join('');
}
