import type { InputError } from '../errors.ts';
import { type Node, unwrapped, walk } from './ast.ts';
import type { Settings } from './input.ts';
import type { Note, Span } from './model.ts';
import type { Usage } from './names.ts';
import { nearest } from './nearest.ts';
import type { Source } from './source.ts';
import { GREEK, LORENTZ } from './symbols.ts';

const LORENTZ_RUN = new RegExp(`^(${[...LORENTZ].join('|')})(_?(${[...LORENTZ].join('|')}))*$`);

/** Names of fields that are vectors or tensors by their index: A_mu, F_munu, D_mu. */
function isVectorName(name: string): boolean {
  const [base, ...rest] = name.split('_');
  return /^[ABDFGVWZ]$/.test(base!) && /mu|nu/.test(rest.join('_')) && LORENTZ_RUN.test(rest.join('_'));
}

/** Refuses gauge fields, fermions and multiplets by what their names say. @throws InputError unsupported. */
export function refuseOutOfScope(source: Source, usage: Usage, settings: Settings): void {
  for (const [name, span] of usage.first) {
    if (settings.fields.has(name) || settings.parameters.has(name)) continue;
    if (isVectorName(name))
      throw source.fault(
        'unsupported',
        `"${source.quote(span)}" carries a space-time index; only scalar fields are read (no gauge fields, no fermions).`,
        span,
      );
    if (/^gamma_/.test(name) && LORENTZ_RUN.test(name.slice(6)))
      throw source.fault('unsupported', 'Gamma matrices belong to fermions, which are out of scope.', span);
  }
}

/** The highest integer power with which a name is typed, to guess which name is the field. */
function likelyField(nodes: readonly Node[]): string | null {
  let best: string | null = null;
  let highest = 2n;
  const look = (node: Node): void => {
    if (node.is !== 'power' || node.exponent.is !== 'number') return;
    const base = unwrapped(node.base);
    if (base.is === 'name' && node.exponent.value.num > highest) {
      highest = node.exponent.value.num;
      best = base.name;
    }
  };
  for (const node of nodes) walk(node, look);
  return best;
}

/** A name "dphi" beside a name "phi": perhaps meant as a derivative. */
function gluedDerivative(usage: Usage): string | null {
  for (const name of usage.first.keys())
    if (name.startsWith('d') && name.length > 1 && usage.first.has(name.slice(1))) return name;
  return null;
}

/** The error for a text in which nothing stands under a derivative. */
export function suggestField(source: Source, usage: Usage, nodes: readonly Node[]): InputError {
  const glued = gluedDerivative(usage);
  if (glued !== null) {
    const text = `No field has a kinetic term. "${glued}" is one name here; a derivative is written "d ${glued.slice(1)}".`;
    return source.fault('no-kinetic-term', text, usage.first.get(glued)!, `d ${glued.slice(1)}`);
  }
  const likely = likelyField(nodes) ?? [...usage.first.keys()][0];
  if (likely === undefined)
    return source.fault('no-kinetic-term', 'No field stands in this Lagrangian.', {
      start: nodes[0]?.start ?? 0,
      end: nodes.at(-1)?.end ?? 1,
    });
  return source.fault(
    'no-kinetic-term',
    `No field has a kinetic term. If ${likely} is the field, add "1/2 (d ${likely})^2".`,
    usage.first.get(likely)!,
  );
}

const stripped = (node: Node): Node => (node.is === 'power' ? stripped(node.base) : node);

/** "1/2f^2": a division followed without a space by a parameter, where a reader may have meant 1/(2f²). */
function divisionNotes(source: Source, node: Node, fields: ReadonlySet<string>): Note[] {
  const notes: Note[] = [];
  walk(node, (inner) => {
    if (inner.is !== 'product') return;
    inner.factors.forEach((factor, k) => {
      const before = inner.factors[k - 1];
      const base = stripped(factor.node);
      if (before?.by !== '/' || !factor.juxtaposed || before.node.end !== factor.node.start) return;
      if (base.is === 'pi' || (base.is === 'name' && !fields.has(base.name))) {
        const span: Span = { start: inner.start, end: factor.node.end };
        const left = source.quote({ start: inner.start, end: before.node.end });
        notes.push({
          code: 'division',
          message: `"${source.quote(span)}" was read from left to right, as (${left}) times ${source.quote(factor.node)}. For the other reading put the denominator in brackets.`,
          span,
        });
      }
    });
  });
  return notes;
}

/** "phi* phi": a star between two equal fields, where a reader may have meant the conjugate. */
function starNotes(source: Source, node: Node, fields: ReadonlySet<string>): Note[] {
  const notes: Note[] = [];
  walk(node, (inner) => {
    if (inner.is !== 'product') return;
    inner.factors.forEach((factor, k) => {
      const before = inner.factors[k - 1]?.node;
      if (!before || factor.juxtaposed || factor.by === '/' || before.is !== 'name' || !fields.has(before.name)) return;
      const lopsided = source.text.slice(before.end, factor.node.start).startsWith('* ');
      if (!lopsided && (factor.node.is !== 'name' || factor.node.name !== before.name)) return;
      const span: Span = { start: before.start, end: factor.node.end };
      const message = `"${source.quote(span)}" was read as a product; the conjugate is written ${before.name}^*.`;
      notes.push({ code: 'star', message, span });
    });
  });
  return notes;
}

/** "V(phi)", "phi(x)": a name before the bracket of one name, where a reader may have meant a function. */
function callNotes(source: Source, node: Node): Note[] {
  const notes: Note[] = [];
  walk(node, (inner) => {
    if (inner.is !== 'product') return;
    inner.factors.forEach((factor, k) => {
      const left = inner.factors[k - 1]?.node;
      const before = left?.is === 'derivative' ? left.node : left;
      const group = stripped(factor.node);
      const argument = group.is === 'group' && group.open === '(' ? group.node : null;
      if (before?.is !== 'name' || before.end !== group.start || argument?.is !== 'name') return;
      const span: Span = { start: before.start, end: factor.node.end };
      const message = `"${source.quote(span)}" was read as a product, not as a function.`;
      notes.push({ code: 'call', message, span });
    });
  });
  return notes;
}

/** "δm": a delta before another parameter, where a reader may have meant one symbol. */
function deltaNotes(source: Source, node: Node, fields: ReadonlySet<string>): Note[] {
  const notes: Note[] = [];
  walk(node, (inner) => {
    if (inner.is !== 'product') return;
    inner.factors.forEach((factor, k) => {
      const before = inner.factors[k - 1]?.node;
      const base = stripped(factor.node);
      if (before?.is !== 'name' || before.name !== 'delta' || base.is !== 'name' || fields.has(base.name)) return;
      const span: Span = { start: before.start, end: base.end };
      const message = `"${source.quote(span)}" was read as the product of delta and ${base.name}; one symbol is written delta_${base.name}.`;
      notes.push({ code: 'delta', message, span });
    });
  });
  return notes;
}

/** A name that is made of other names of the text: "lambdaphi". */
function gluedNotes(usage: Usage, fields: ReadonlySet<string>): Note[] {
  const known = [...new Set([...GREEK, ...usage.first.keys()])];
  return [...usage.first].flatMap(([name, span]) => {
    const tail = [...fields].find((field) => name !== field && name.length > field.length && name.endsWith(field));
    if (tail === undefined || fields.has(name)) return [];
    const head = name.slice(0, name.length - tail.length);
    if (!known.includes(head) && head !== 'd') return [];
    const meant = head === 'd' ? `d ${tail}` : `${head} ${tail}`;
    return [{ code: 'one-name', message: `"${name}" was read as one name; write "${meant}" if that is meant.`, span }];
  });
}

function similarNotes(usage: Usage): Note[] {
  return [...usage.first].flatMap(([name, span]) => {
    const meant = /^[A-Za-z]{4,}$/.test(name) && !GREEK.has(name) ? nearest(name, GREEK) : null;
    if (meant !== null && meant.length > 4)
      return [
        { code: 'spelling', message: `"${name}" is a name of its own here; "${meant}" is spelt otherwise.`, span },
      ];
    const match = /^([A-Za-z]+)(\d+)$/.exec(name);
    if (!match || !usage.first.has(`${match[1]}_${match[2]}`)) return [];
    return [{ code: 'similar-names', message: `"${name}" and "${match[1]}_${match[2]}" are two names here.`, span }];
  });
}

function indexNotes(usage: Usage, fields: ReadonlySet<string>): Note[] {
  return [...fields].flatMap((name) => {
    const span = usage.first.get(name);
    if (!span || !/_[abcijkl]$/.test(name)) return [];
    const message = `${name} was read as one field, not as a component that is summed over; multiplets are not read yet.`;
    return [{ code: 'index-like', message, span }];
  });
}

/** What a reader may have meant otherwise: notes on how the text was read. */
export function readingNotes(
  source: Source,
  nodes: readonly Node[],
  usage: Usage,
  fields: ReadonlySet<string>,
  complex: ReadonlySet<string>,
): Note[] {
  const complexParameters = [...complex].filter((name) => !fields.has(name) && usage.first.has(name));
  return [
    ...nodes.flatMap((node) => divisionNotes(source, node, fields)),
    ...nodes.flatMap((node) => starNotes(source, node, fields)),
    ...nodes.flatMap((node) => callNotes(source, node)),
    ...nodes.flatMap((node) => deltaNotes(source, node, fields)),
    ...gluedNotes(usage, fields),
    ...similarNotes(usage),
    ...indexNotes(usage, fields),
    ...complexParameters.map((name) => ({
      code: 'complex-parameter',
      message: `${name} was read as a complex parameter, because its conjugate occurs or it is declared so.`,
      span: usage.first.get(name)!,
    })),
  ];
}
