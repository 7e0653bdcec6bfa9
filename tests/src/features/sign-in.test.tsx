import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, expect, it, vi } from 'vitest';

import { SignInScreen } from '../../../src/features/sign-in/sign-in-screen';
import { fakeServer, refusal } from '../support/fake-server';
import { show } from '../support/show';
import { me } from '../support/things';

vi.mock('expo-router', async () => (await import('../support/router-stub')).expoRouter);

const demo = {
  name: 'Maren Oakhill',
  email: 'maren@example.com',
  password: 'a-demo-password',
  role: 'fieldEngineer',
};

/** Signed out until the right password has been given. */
function server({ signIns = [] as object[] } = {}) {
  let isSignedIn = false;
  return fakeServer({
    'GET /api/me': () =>
      isSignedIn ? me : { status: 401, body: refusal('NOT_SIGNED_IN', 'Sign in first.') },
    'GET /api/demo-sign-ins': () => ({ signIns }),
    'POST /api/auth/sign-in/email': ({ body }) => {
      isSignedIn = body.password === demo.password;
      return isSignedIn
        ? { ok: true }
        : { status: 401, body: refusal('WRONG_SIGN_IN', 'E-mail or password is not right.') };
    },
  });
}

beforeEach(() => vi.clearAllMocks());

it('asks for what is missing before it asks the server', async () => {
  const { of } = server();
  show(<SignInScreen />);
  await userEvent.click(await screen.findByRole('button', { name: 'Sign in' }));
  expect(screen.getByText('Type the e-mail address you were invited with.')).toHaveAttribute('role', 'alert');
  expect(screen.getByText('Type your password.')).toBeVisible();
  expect(screen.getByLabelText('E-mail')).toHaveAttribute('aria-invalid', 'true');
  expect(of('/api/auth/sign-in/email')).toHaveLength(0);
});

it('says that they are wrong and keeps what was typed', async () => {
  server();
  show(<SignInScreen />);
  await userEvent.type(await screen.findByLabelText('E-mail'), 'maren@example.com');
  await userEvent.type(screen.getByLabelText('Password'), 'a-wrong-one{Enter}');
  expect(await screen.findByText('E-mail or password is not right.')).toHaveAttribute('role', 'alert');
  expect(screen.getByLabelText('E-mail')).toHaveValue('maren@example.com');
  expect(screen.queryByText(/^Sent to/)).toBeNull();
});

it('signs in with Enter and goes where somebody wanted to go', async () => {
  server();
  show(<SignInScreen from="/fields/field-1/plans" />);
  await userEvent.type(await screen.findByLabelText('E-mail'), demo.email);
  await userEvent.type(screen.getByLabelText('Password'), `${demo.password}{Enter}`);
  expect(await screen.findByText('Sent to /fields/field-1/plans')).toBeVisible();
});

it('offers the demonstration only where there is one', async () => {
  server();
  show(<SignInScreen />);
  await screen.findByRole('button', { name: 'Sign in' });
  expect(screen.queryByRole('region', { name: 'Demo sign-ins' })).toBeNull();
});

it('signs in as one of the demonstration with one tap', async () => {
  const { of } = server({ signIns: [demo] });
  show(<SignInScreen />);
  await userEvent.click(
    await screen.findByRole('button', { name: 'Sign in as Maren Oakhill, field engineer' }),
  );
  await waitFor(() => expect(screen.getByText('Sent to /')).toBeVisible());
  expect(of('/api/auth/sign-in/email')[0]?.body).toEqual({ email: demo.email, password: demo.password });
});
