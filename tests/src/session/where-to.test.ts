import { expect, it } from 'vitest';

import { whereTo } from '../../../src/session/where-to';

it('comes back to where somebody wanted to go', () => {
  expect(whereTo('/fields/1/plans?well=HF-4')).toBe('/fields/1/plans?well=HF-4');
  expect(whereTo(undefined)).toBe('/');
});

it.each([
  'https://example.com',
  '//example.com',
  '/\\example.com',
  'javascript:alert(1)',
  '/sign-in?from=/x',
])('does not follow %s', (from) => expect(whereTo(from)).toBe('/'));
