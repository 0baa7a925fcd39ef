import { describe, expect, it } from 'vitest';
import { safeNext } from '#features/account/next.ts';

describe('where to go after signing in', () => {
  it('goes to a page of this site', () => {
    for (const path of ['/', '/models/new?example=portal', '/expansions/new?input=%7B%7D#x'])
      expect(safeNext(path)).toBe(path);
  });

  it('never leaves this site', () => {
    for (const path of [
      '//evil.example',
      '/\\evil.example',
      'https://evil.example',
      'javascript:alert(1)',
      '/\t/evil.example',
      '',
      null,
      ['/'],
      `/${'x'.repeat(2000)}`,
    ])
      expect(safeNext(path, '/models'), String(path)).toBe('/models');
  });
});
