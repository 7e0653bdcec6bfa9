import { screen } from '@testing-library/react';
import { expect, it, vi } from 'vitest';

import { SignedInOnly } from '../../../src/session/signed-in-only';
import { fakeServer, refusal } from '../support/fake-server';
import { show } from '../support/show';
import { me } from '../support/things';

vi.mock('expo-router', async () => (await import('../support/router-stub')).expoRouter);

const secret = <p>Only for members</p>;

it('shows the page to somebody who is signed in', async () => {
  fakeServer({ 'GET /api/me': () => me });
  show(<SignedInOnly>{secret}</SignedInOnly>);
  expect(await screen.findByText('Only for members')).toBeVisible();
});

it('sends others to sign in with the whole address they came for', async () => {
  window.history.replaceState(null, '', '/fields/field-1/plans/plan-1?well=HF-4');
  fakeServer({ 'GET /api/me': () => ({ status: 401, body: refusal('NOT_SIGNED_IN', 'Sign in first.') }) });
  show(<SignedInOnly>{secret}</SignedInOnly>);
  const from = encodeURIComponent('/fields/field-1/plans/plan-1?well=HF-4');
  expect(await screen.findByText(`Sent to /sign-in?from=${from}`)).toBeVisible();
  expect(screen.queryByText('Only for members')).toBeNull();
});

it('does not take a silent server for a closed session', async () => {
  fakeServer({ 'GET /api/me': () => ({ status: 503, body: null }) });
  show(<SignedInOnly>{secret}</SignedInOnly>);
  expect(await screen.findByRole('button', { name: 'Try again' }, { timeout: 10_000 })).toBeVisible();
});
