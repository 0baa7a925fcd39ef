import { describe, expect, it } from 'vitest';
import type { ExpansionRecord, ExpansionState } from '#contract/api.ts';
import { addressOf, FLAGS, filterQuery, isNarrowed, viewOf } from '#features/expansion/view.ts';
import { duration, many, standing, stateText } from '#features/expansion/words.ts';

const view = (query: string) => viewOf(new URLSearchParams(query));

describe('the address of a result page', () => {
  it('says what is shown, and comes back from itself', () => {
    const asked = view('by=factor&show=table&sort=-loops&find=S%3D6&onePI=false&tadpole=true&after=x');
    expect(asked).toEqual({
      by: 'factor',
      show: 'table',
      sort: '-loops',
      find: 'S=6',
      flags: { onePI: 'false', selfContraction: 'any', tadpole: 'true' },
      after: 'x',
    });
    expect(view(addressOf(asked, { after: 'x' }).slice(1))).toEqual(asked);
  });

  it('goes back to the first page when anything else changes', () => {
    expect(addressOf(view('show=table&after=x'), { sort: 'loops' })).toBe('?show=table&sort=loops');
    expect(addressOf(view('by=loops'), { by: 'couplings' })).toBe('?');
  });

  it('falls back to the plain view for what it does not know', () => {
    expect(view('by=colour&show=film&sort=__proto__&onePI=perhaps')).toEqual(view(''));
    expect(view(`find=${'x'.repeat(500)}`).find).toHaveLength(200);
  });

  it('asks the server only for filters that are set', () => {
    expect(filterQuery(view('find=+&onePI=any'))).toEqual({});
    expect(filterQuery(view('find=+12+&selfContraction=false'))).toEqual({ find: '12', selfContraction: 'false' });
    expect(isNarrowed(view('sort=loops&show=table'))).toBe(false);
    for (const { flag } of FLAGS) expect(isNarrowed(view(`${flag}=true`))).toBe(true);
  });
});

const record = (change: Partial<ExpansionRecord>): ExpansionRecord =>
  ({
    state: 'complete',
    progress: { classes: 1200, estimated: null, fraction: null, phase: '' },
    engine: { name: 'wickwork', version: '1.0.0' },
    finishedAt: '2026-12-01T10:00:00.000Z',
    milliseconds: 3,
    reusedFrom: null,
    error: null,
    ledger: { state: 'balanced' },
    ...change,
  }) as ExpansionRecord;

describe('the standing of a result', () => {
  it('says what is proven, by what, when and how fast', () => {
    const text = standing(record({})).join(' ');
    expect(text).toContain('no diagram is missing');
    expect(text).toContain('Computed by wickwork 1.0.0 on 2026-12-01 in 3 ms.');
    expect(text).not.toContain('computed before');
  });

  it('claims no proof for a list that does not balance, nor one of its own for a cut', () => {
    const told = (state: 'unbalanced' | 'rests') =>
      standing(record({ ledger: { state } as ExpansionRecord['ledger'] })).join(' ');
    expect(told('unbalanced')).toContain('do not use this list');
    expect(told('unbalanced')).not.toContain('no diagram is missing');
    expect(told('rests')).toContain('rests on the whole list before the cut');
  });

  it('says that a list was computed for another model, and nothing before there is a ledger', () => {
    expect(standing(record({ reusedFrom: 'x' })).join(' ')).toContain('computed before');
    expect(standing(record({ ledger: null }))).toEqual([]);
  });
});

describe('states of a computation', () => {
  const every: ExpansionState[] = ['queued', 'running', 'failed', 'cancelled', 'interrupted', 'unbalanced'];

  it.each(every)('%s has words of its own', (state) => {
    const told = stateText(record({ state }))!;
    const others = every.filter((other) => other !== state).map((other) => stateText(record({ state: other }))!.text);
    expect(told.title).not.toBe('');
    expect(others).not.toContain(told.text);
  });

  it('a complete list needs none; a failure is told as the server tells it', () => {
    expect(stateText(record({}))).toBeNull();
    const error = { code: 'timeout', message: 'It took too long.' } as unknown as ExpansionRecord['error'];
    expect(stateText(record({ state: 'failed', error }))).toMatchObject({ text: 'It took too long.', tone: 'bad' });
    expect(stateText(record({ state: 'running' }))!.title).toBe('Computing: 1,200 diagrams so far');
  });
});

describe('words', () => {
  it('counts and times', () => {
    expect([many(1, 'diagram'), many(0, 'diagram'), many(1234, 'class', 'classes')]).toEqual([
      '1 diagram',
      '0 diagrams',
      '1,234 classes',
    ]);
    expect([0, 3.4, 999.4, 1400, 125_000].map(duration)).toEqual(['1 ms', '3 ms', '999 ms', '1.4 s', '2 min 5 s']);
    expect([999.6, 59_960, 119_700].map(duration)).toEqual(['1.0 s', '1 min 0 s', '2 min 0 s']);
  });
});
