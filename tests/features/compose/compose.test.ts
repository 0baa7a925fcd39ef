import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { expansionRequestSchema, type ModelInput } from '#contract/request.ts';
import { prepare, previewModel } from '#engine/index.ts';
import {
  type Ask,
  askOf,
  askOfRequest,
  DROPS,
  FIRST_ASK,
  KEEPS,
  legsOf,
  ORDERS,
  queryOf,
  requestOf,
} from '#features/compose/ask.ts';
import { firstLegs, moved, operatorFor, operatorsOf, spokenCorrelator, without } from '#features/compose/operators.ts';
import { placeOf, sentenceOf } from '#features/compose/refusals.ts';
import { whyNone } from '#features/compose/vanish.ts';
import { countWords, elapsedWords, keepWords, monomialWords, orderWords, timeWords } from '#features/compose/words.ts';

const model = (lagrangian: string): ModelInput => ({
  lagrangian,
  fields: {},
  parameters: {},
  mixing: 'vertex',
  conventions: { signature: '+---', dimension: '4' },
});
const PORTAL = model(
  '1/2 (d h)^2 - 1/2 m^2 h^2 + 1/2 (d s)^2 - 1/2 M^2 s^2 - lambda/4! h^4 - rho/4 h^2 s^2 - sigma/4! s^4',
);
const CHARGED = model(
  '(d phi^*)(d phi) - m^2 phi^* phi + 1/2 (d chi)^2 - 1/2 M^2 chi^2 - g phi^* phi chi - lambda/4 (phi^* phi)^2',
);

const operators = (input: ModelInput) =>
  operatorsOf(previewModel(input).fields.map((field) => ({ ...field, mathml: `<math><mi>${field.name}</mi></math>` })));

describe('the question in an address and in a form', () => {
  const digits = fc.integer({ min: 0, max: 60 }).map(String);
  const asks: fc.Arbitrary<Ask> = fc.record({
    title: fc.constantFrom('', 'One loop & more', 'ħ = 1?'),
    legs: fc.array(fc.constantFrom('h', 's', 'phi', 'phi^*', '__proto__')).map((legs) => legs.join(' ')),
    by: fc.constantFrom(...ORDERS),
    loops: digits,
    total: fc.constantFrom('0', '3', '1/2'),
    powers: fc.uniqueArray(
      fc.tuple(fc.constantFrom('lambda', 'g', '__proto__', 'λ₁'), fc.constantFrom('1', '2', '-1', '1/2')),
      {
        selector: ([name]) => name,
      },
    ),
    through: fc.boolean(),
    keep: fc.constantFrom(...KEEPS),
    drop: fc.subarray([...DROPS]),
  });

  it('comes back from the address as it was asked', () => {
    fc.assert(
      fc.property(asks, (ask) => {
        const back = askOf(new URLSearchParams(queryOf(ask).toString()));
        const seen = {
          ...ask,
          ...(ask.by === 'loops' ? {} : { loops: '1' }),
          ...(ask.by === 'total' ? {} : { total: '2' }),
        };
        expect(back).toEqual({ ...seen, powers: ask.by === 'powers' ? ask.powers : [] });
      }),
    );
  });

  it('is as the first one where an address says nothing', () => {
    expect(
      askOf(new URLSearchParams('model=x'), { ...FIRST_ASK, legs: 'h h', through: true, drop: ['tadpoles'] }),
    ).toEqual({
      ...FIRST_ASK,
      legs: 'h h',
      through: true,
      drop: ['tadpoles'],
    });
  });

  it('takes an unticked box of a sent form as no', () => {
    const form = new FormData();
    for (const [name, value] of [
      ['by', 'loops'],
      ['loops', '2'],
      ['keep', 'all'],
      ['legs', ' h  h '],
    ])
      form.set(name!, value!);
    const ask = askOf(form, { ...FIRST_ASK, through: true, drop: ['tadpoles'] });
    expect([ask.through, ask.drop, ask.keep, ask.loops, ask.legs]).toEqual([false, [], 'all', '2', 'h  h']);
  });

  it('is no choice of the form: the first one stands', () => {
    expect(askOf(new URLSearchParams('by=colour&keep=everything')).keep).toBe('1PI');
  });
});

describe('the request', () => {
  const ask = (part: Partial<Ask>): Ask => ({ ...FIRST_ASK, ...part });

  it('is what the contract takes, and prepares', () => {
    const request = requestOf(
      PORTAL,
      ask({
        legs: '⟨h h s s⟩',
        by: 'powers',
        powers: [
          ['lambda', '1'],
          ['rho', '1'],
          ['sigma', ''],
        ],
      }),
    );
    expect(request.legs).toEqual(['h', 'h', 's', 's']);
    expect(request.order).toEqual({ lambda: 1, rho: 1 });
    expect(() => prepare(expansionRequestSchema.parse(request))).not.toThrow();
  });

  it('keeps fractions as text and never makes a number of a word', () => {
    expect(requestOf(PORTAL, ask({ by: 'total', total: '1/2' })).order).toEqual({ total: '1/2' });
    expect(expansionRequestSchema.safeParse(requestOf(PORTAL, ask({ by: 'total', total: 'two' }))).success).toBe(false);
    for (const loops of ['', '1.5', '-1', 'one'])
      expect(expansionRequestSchema.safeParse(requestOf(PORTAL, ask({ loops }))).success).toBe(false);
  });

  it('asks again what a stored request asked', () => {
    for (const part of [
      { legs: 'h h', loops: '3', through: true },
      { legs: '', by: 'total', total: '4', keep: 'all' },
      { legs: 's s', by: 'powers', powers: [['rho', '2'] as const], drop: ['tadpoles'] },
    ] satisfies Partial<Ask>[]) {
      const request = expansionRequestSchema.parse(requestOf(PORTAL, ask(part)));
      expect(askOfRequest(request)).toEqual(ask(part));
    }
  });
});

describe('legs', () => {
  it('splits what people type', () => {
    for (const text of ['h h s', '<h, h; s>', '⟨ h h s ⟩', 'h,h,s']) expect(legsOf(text)).toEqual(['h', 'h', 's']);
    expect(legsOf('  ')).toEqual([]);
  });

  it('offers each field, and the conjugate of a complex one', () => {
    expect(operators(CHARGED).map(({ name }) => name)).toEqual(['chi', 'phi', 'phi^*']);
    expect(operators(CHARGED)[2]!.mathml).toBe('<math><msup><mrow><mi>phi</mi></mrow><mo>∗</mo></msup></math>');
  });

  it('knows the spellings that the engine takes for a leg', () => {
    const known = operators(CHARGED);
    for (const leg of ['phi', 'φ', '\\phi', 'phi^*', 'φ†', 'phi^\\dagger', 'conj(phi)', 'χ', 'chi^*']) {
      const request = { ...requestOf(CHARGED, { ...FIRST_ASK, legs: '' }), legs: [leg] };
      expect(operatorFor(known, leg)?.name, leg).toBe(prepare(request).names.legs[0]);
    }
    expect(operatorFor(known, 'q')).toBeUndefined();
  });

  it('moves and removes without losing any', () => {
    expect(moved(['h', 's', 't'], 0, 1)).toEqual(['s', 'h', 't']);
    expect(moved(['h', 's'], 0, -1)).toEqual(['h', 's']);
    expect(moved(['h', 's'], 1, 1)).toEqual(['h', 's']);
    expect(without(['h', 's', 't'], 1)).toEqual(['h', 't']);
  });

  it('starts from the propagator of the first field', () => {
    expect(firstLegs(previewModel(PORTAL).fields.map((field) => ({ ...field, mathml: '' })))).toBe('h h');
    const [, phi] = previewModel(CHARGED).fields.map((field) => ({ ...field, mathml: '' }));
    expect(firstLegs([phi!])).toBe('phi phi^*');
    expect(firstLegs([])).toBe('');
  });

  it('is read out', () => {
    expect(spokenCorrelator(operators(CHARGED), ['phi', 'phi^*'])).toBe('correlator of phi, phi conjugate');
    expect(spokenCorrelator([], [])).toContain('vacuum');
  });
});

describe('a correlator that vanishes', () => {
  const rules = (input: ModelInput) => previewModel(input).rules;

  it('is told by an odd number of a field that every vertex holds evenly', () => {
    expect(whyNone(rules(PORTAL), ['h', 's', 's'])).toContain('even number of h');
    expect(whyNone(rules(PORTAL), ['h', 'h', 's', 's'])).toBeNull();
  });

  it('is told by a charge that every vertex conserves', () => {
    expect(whyNone(rules(CHARGED), ['phi', 'phi'])).toContain('conserves the number of phi');
    expect(whyNone(rules(CHARGED), ['phi', 'phi^*', 'chi'])).toBeNull();
  });

  it('is not claimed where a vertex is odd', () => {
    expect(whyNone(rules(model('1/2 (d phi)^2 - 1/2 m^2 phi^2 - g/3! phi^3')), ['phi'])).toBeNull();
  });
});

describe('refusals', () => {
  const thrownBy = (part: Partial<Ask>, input = PORTAL) => {
    try {
      prepare(requestOf(input, { ...FIRST_ASK, ...part }));
    } catch (error) {
      const { code, message, place } = error as { code: 'syntax'; message: string; place: { line: number } | null };
      return { code, message, line: place?.line ?? null, column: null };
    }
    throw new Error('nothing was refused');
  };

  it('stand at the field they concern', () => {
    expect(placeOf(thrownBy({ legs: 'h q' }))).toBe('legs');
    expect(placeOf(thrownBy({ by: 'powers', powers: [['kappa', '1']] }))).toBe('order');
    expect(placeOf(thrownBy({ legs: 'h h', by: 'total', total: 'x' }))).toBe('order');
    expect(placeOf(thrownBy({ legs: 'h h', loops: '61' }))).toBe('order');
    expect(placeOf(thrownBy({}, model('1/2 (d phi)^2 - - phi^')))).toBe('model');
    expect(placeOf({ code: 'infinite-order', message: 'The order is infinite', line: null })).toBe('order');
    expect(placeOf({ code: 'bad-request', message: 'In "order.loops": Invalid input.', line: null })).toBe('order');
    expect(placeOf({ code: 'bad-request', message: 'In "legs": Too big.', line: null })).toBe('legs');
    expect(placeOf({ code: 'rate', message: 'Visitors run at most 20 expansions an hour.', line: null })).toBe('whole');
  });

  it('are in words of the form, not of the contract', () => {
    const error = {
      code: 'bad-request',
      message: 'In "order.loops": Invalid input.',
      line: null,
      column: null,
    } as const;
    expect(sentenceOf(error)).not.toContain('Invalid');
    expect(sentenceOf({ ...error, code: 'wrong-legs', message: 'Leg 2 is no field.' })).toBe('Leg 2 is no field.');
  });
});

describe('words', () => {
  it('say an order as people do', () => {
    expect(orderWords({ loops: 0 }, false)).toBe('tree level');
    expect(orderWords({ loops: 2 }, true)).toBe('through two loops');
    expect(orderWords({ loops: 9 }, false)).toBe('9 loops');
    expect(orderWords({ total: '1/2' }, false)).toBe('total power 1/2');
    expect(orderWords({ lambda: 2, rho: 1, sigma: 0 }, false)).toBe('order λ² ρ');
    expect(orderWords({}, false)).toBe('order zero');
  });

  it('say the fields of a vertex as a monomial', () => {
    expect(monomialWords(['h', 'h', 's', 's'])).toBe('h² s²');
    expect(monomialWords(['phi', 'phi_1', 'phi^*', 'phi^*'])).toBe('φ φ_1 φ*²');
  });

  it('say what is kept and dropped', () => {
    expect(keepWords('1PI', [])).toBe('1PI');
    expect(keepWords('all', ['tadpoles', 'scaleless'])).toBe('all diagrams, without tadpoles or scaleless pieces');
  });

  it('count exactly what was counted, and round what was estimated', () => {
    expect(countWords(1, 'exact')).toBe('1 diagram');
    expect(countWords(12_345, 'exact')).toBe('12,345 diagrams');
    expect(countWords(12_345, 'estimate')).toBe('about 12,000 diagrams');
    expect(countWords(0, 'exact')).toBe('0 diagrams');
    expect(countWords(3e20, 'estimate')).toBe('about 10²⁰ diagrams');
  });

  it('say times in the unit that fits', () => {
    expect([0.2, 40.2, 200, 9000].map(timeWords)).toEqual(['under a second', 'about 41 s', 'about 3 min', 'about 3 h']);
    expect([900, 61_000, 3_720_000, -5].map(elapsedWords)).toEqual(['1 s', '1 min 1 s', '1 h 2 min', '0 s']);
  });
});
