import { describe, expect, it } from 'vitest';
import { isUnderWay, type Job, mayRetry, shareOf, standing } from '#features/jobs/rows.ts';
import { operatorLatex } from '../../../src/pages/expansions/_row.ts';

const job = (part: Partial<Job>): Job => ({
  id: 'a',
  title: '⟨h h⟩',
  state: 'running',
  progress: { classes: 40, estimated: 160, fraction: null, phase: 'running' },
  createdAt: '2026-01-01T00:00:00.000Z',
  finishedAt: null,
  mine: true,
  milliseconds: null,
  reused: false,
  failure: null,
  classes: null,
  ...part,
});
const at = Date.parse('2026-01-01T00:01:05.000Z');

describe('how a computation stands', () => {
  it('while it runs: so far, expected, time', () => {
    expect(standing(job({}), at)).toBe('40 of about 160 diagrams, 1 min 5 s');
    const open = { classes: 1, estimated: null, fraction: null, phase: '' };
    expect(standing(job({ progress: open }), at)).toBe('1 diagram, 1 min 5 s');
  });

  it('while it waits', () => {
    expect(standing(job({ state: 'queued' }), at)).toBe('1 min 5 s so far');
  });

  it('when it has ended', () => {
    expect(standing(job({ state: 'complete', classes: 7, milliseconds: 120 }), at)).toBe(
      '7 diagrams, computed in under a second, balanced',
    );
    expect(standing(job({ state: 'complete', classes: 7, reused: true }), at)).toContain('taken from store');
    expect(standing(job({ state: 'failed', failure: 'It took longer than 900 s.' }), at)).toBe(
      'It took longer than 900 s.',
    );
    expect(standing(job({ state: 'cancelled' }), at)).toBe('without a result');
    expect(standing(job({ state: 'unbalanced' }), at)).toContain('defect');
  });

  it('as a share between none and all', () => {
    expect(shareOf({ classes: 40, estimated: 160, fraction: null, phase: '' })).toBe(0.25);
    expect(shareOf({ classes: 400, estimated: 160, fraction: null, phase: '' })).toBe(1);
    expect(shareOf({ classes: 40, estimated: null, fraction: null, phase: '' })).toBeNull();
    expect(shareOf({ classes: 40, estimated: 160, fraction: 0.5, phase: '' })).toBe(0.5);
  });

  it('and what may be done with it', () => {
    const states = ['queued', 'running', 'complete', 'failed', 'cancelled', 'interrupted', 'unbalanced'] as const;
    expect(states.filter((state) => isUnderWay({ state }))).toEqual(['queued', 'running']);
    expect(states.filter((state) => mayRetry({ state }))).toEqual(['failed', 'cancelled', 'interrupted']);
  });
});

describe('a field operator as LaTeX', () => {
  it('has Greek letters, lowered indices and a raised star', () => {
    expect(['h', 'phi', 'phi^*', 'phi_1', 'phi1', 'chi_R^*', 'dil'].map(operatorLatex)).toEqual([
      'h',
      '\\phi',
      '\\phi^{*}',
      '\\phi_{1}',
      '\\phi_{1}',
      '\\chi_{R}^{*}',
      '\\mathrm{dil}',
    ]);
  });
});
