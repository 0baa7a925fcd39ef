import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { modelSchema } from '#contract/request.ts';
import { lineDiff } from '#features/model/diff.ts';
import { draftOf, EMPTY, inputOf, override, overrideOf } from '#features/model/draft.ts';
import { examples } from '#features/model/examples.ts';
import { draftFromForm } from '#features/model/form.ts';
import { begin, change, redo, STEPS, undo } from '#features/model/history.ts';
import { offsetsOf, replaceStretch, segments } from '#features/model/marks.ts';

describe('marks', () => {
  it('finds the offsets of a line and column', () => {
    expect(offsetsOf('ab\ncde', { line: 2, column: 2, length: 2 })).toEqual({ start: 4, end: 6 });
    expect(offsetsOf('ab\ncde', { line: 1, column: 1 })).toEqual({ start: 0, end: 1 });
  });

  it('marks the last character when the place is the end of the text', () => {
    expect(offsetsOf('phi +', { line: 1, column: 6, length: 1 })).toEqual({ start: 4, end: 5 });
    expect(offsetsOf('', { line: 1, column: 1, length: 1 })).toEqual({ start: 0, end: 0 });
  });

  it('has no offsets where there is no place', () => {
    expect(offsetsOf('phi', { line: null, column: null })).toBeNull();
  });

  it('cuts overlapping marks at their edges', () => {
    const cut = segments('abcdef', [
      { start: 1, end: 4, kind: 'lit' },
      { start: 3, end: 5, kind: 'mistake' },
    ]);
    expect(cut.map(({ text, kinds }) => [text, ...kinds])).toEqual([
      ['a'],
      ['bc', 'lit'],
      ['d', 'lit', 'mistake'],
      ['e', 'mistake'],
      ['f'],
    ]);
  });

  it('loses no character, whatever the marks', () => {
    const mark = fc.record({
      start: fc.integer({ min: -5, max: 60 }),
      end: fc.integer({ min: -5, max: 60 }),
      kind: fc.constantFrom('mistake' as const, 'note' as const, 'lit' as const),
    });
    fc.assert(
      fc.property(fc.string({ maxLength: 50 }), fc.array(mark, { maxLength: 5 }), (text, marks) => {
        expect(
          segments(text, marks)
            .map((segment) => segment.text)
            .join(''),
        ).toBe(text);
      }),
    );
  });

  it('replaces a stretch and says where the caret stands', () => {
    expect(replaceStretch('a lamda b', { start: 2, end: 7 }, 'lambda')).toEqual({ text: 'a lambda b', caret: 8 });
  });
});

describe('history', () => {
  it('takes typing in one place within a second as one step', () => {
    let history = begin('');
    history = change(history, 'p', 'lagrangian', 0);
    history = change(history, 'ph', 'lagrangian', 300);
    history = change(history, 'phi', 'lagrangian', 900);
    history = change(history, 'phi ', 'lagrangian', 2500);
    expect(undo(history).present).toBe('phi');
    expect(undo(undo(history)).present).toBe('');
  });

  it('never joins untagged changes', () => {
    const history = change(change(begin('a'), 'b', '', 0), 'c', '', 1);
    expect(undo(history).present).toBe('b');
  });

  it('redoes what was undone, and forgets it after a new change', () => {
    const history = change(change(begin('a'), 'b', '', 0), 'c', '', 1);
    expect(redo(undo(history)).present).toBe('c');
    expect(redo(change(undo(history), 'd', '', 2)).present).toBe('d');
  });

  it(`keeps ${STEPS} steps`, () => {
    let history = begin(0);
    for (let step = 1; step <= STEPS + 50; step++) history = change(history, step, '', step);
    for (let step = 0; step < STEPS + 50; step++) history = undo(history);
    expect(history.present).toBe(50);
    expect(undo(history)).toBe(history);
  });

  it('comes back to the last state after any number of undos and as many redos', () => {
    fc.assert(
      fc.property(fc.array(fc.string(), { maxLength: 20 }), fc.nat(25), (states, count) => {
        const full = states.reduce((history, state, at) => change(history, state, '', at), begin('start'));
        let history = full;
        for (let step = 0; step < count; step++) history = undo(history);
        for (let step = 0; step < count; step++) history = redo(history);
        expect(history.present).toBe(full.present);
      }),
    );
  });
});

describe('draft', () => {
  it('sets and clears overrides without touching others', () => {
    const one = override(EMPTY.parameters, 'v', { weight: '0' });
    const two = override(one, 'dm', { loops: 1 });
    expect(overrideOf(two, 'v')).toEqual({ weight: '0' });
    expect(override(two, 'v', { weight: undefined })).toEqual([['dm', { loops: 1 }]]);
  });

  it('takes any name for a coupling', () => {
    const draft = { ...EMPTY, lagrangian: 'x', parameters: override(EMPTY.parameters, '__proto__', { loops: 1 }) };
    expect(JSON.stringify(inputOf(draft).parameters)).toBe('{"__proto__":{"loops":1}}');
  });

  it('comes back from the request that it makes', () => {
    for (const { input, title } of examples) expect(inputOf(draftOf(input, title))).toEqual(input);
  });

  it('makes requests that the contract accepts, for every worked example', () => {
    expect(examples.length).toBeGreaterThanOrEqual(8);
    for (const { input } of examples) expect(modelSchema.parse(input)).toEqual(input);
  });
});

describe('form', () => {
  it('reads the same draft as the island would send', () => {
    const form = new FormData();
    for (const [name, value] of [
      ['title', ' Portal '],
      ['lagrangian', 'a\r\nb'],
      ['signature', 'euclidean'],
      ['dimension', '3-2eps'],
      ['field:kind:phi', 'complex'],
      ['parameter:weight:v', '0'],
      ['parameter:weight:g', ''],
      ['parameter:loops:dm', '2'],
      ['parameter:vertex:dm', 'on'],
    ] as const)
      form.append(name, value);
    expect(draftFromForm(form)).toEqual({
      title: 'Portal',
      description: '',
      lagrangian: 'a\nb',
      signature: 'euclidean',
      dimension: '3-2eps',
      mixing: 'vertex',
      fields: [['phi', { kind: 'complex' }]],
      parameters: [
        ['v', { weight: '0' }],
        ['dm', { loops: 2, vertex: true }],
      ],
    });
  });

  it('reads an empty form as an empty draft', () => {
    expect(draftFromForm(new FormData())).toEqual(EMPTY);
  });
});

describe('difference of two revisions', () => {
  it('keeps common lines and marks the others', () => {
    expect(lineDiff('a\nb\nc', 'a\nx\nc')).toEqual([
      { kind: 'same', text: 'a' },
      { kind: 'gone', text: 'b' },
      { kind: 'new', text: 'x' },
      { kind: 'same', text: 'c' },
    ]);
  });

  it('gives both texts back', () => {
    const text = fc
      .array(fc.constantFrom('a', 'b', 'c', ''), { minLength: 1, maxLength: 8 })
      .map((lines) => lines.join('\n'));
    fc.assert(
      fc.property(text, text, (before, after) => {
        const lines = lineDiff(before, after);
        const without = (kind: string) => lines.filter((line) => line.kind !== kind).map((line) => line.text);
        expect(without('new').join('\n')).toBe(before);
        expect(without('gone').join('\n')).toBe(after);
      }),
    );
  });
});
