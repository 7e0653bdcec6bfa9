import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';

import { PlanScreen } from '../../../src/features/plans/plan-screen';
import { checkSentence, gapSentence, headline } from '../../../src/features/plans/sentences';
import { fakeServer, refusal } from '../support/fake-server';
import { addressOf, router } from '../support/router-stub';
import { show } from '../support/show';
import { field, makeJob, makePlan, makeResult, me } from '../support/things';

vi.mock('expo-router', async () => (await import('../support/router-stub')).expoRouter);

const PLAN = '/api/fields/field-1/plans/plan-1';
const JOB = '/api/fields/field-1/jobs/job-1';
const screenOf = () => show(<PlanScreen fieldId="field-1" planId="plan-1" />);

function server(changes: Parameters<typeof fakeServer>[0] = {}) {
  return fakeServer({
    'GET /api/me': () => me,
    'GET /api/fields': () => ({ fields: [field] }),
    [`GET ${PLAN}`]: () => makePlan(),
    [`GET ${JOB}`]: () => makeJob(),
    ...changes,
  });
}

const unfinished = (jobState: 'running' | 'failed' | 'cancelled') =>
  makePlan({
    result: null,
    plan: { ...makePlan().plan, jobState },
    can: { cancel: jobState === 'running', buildAgain: jobState !== 'running', withdraw: false },
  });

beforeEach(() => {
  vi.clearAllMocks();
  router.params = {};
});

describe('the sentences', () => {
  it('say what the plan does', () => {
    // Background over the two weeks is 1 / 1.0714 events; holding means (1.70 + 1.72) / 2.
    expect(headline(makeResult()).replaceAll('\u202f', ' ')).toBe(
      '1.07 × background over 2 weeks: 1.00 earthquakes expected where the background is 0.933, and the energy target is met every week. Holding today’s rates would mean 1.71 ×.',
    );
  });

  it('do not hide a week that falls short', () => {
    const result = makeResult();
    result.weeks[1]!.heatJ = 8000 * 3.6e9;
    expect(headline(result)).toContain('one week falls short of its target');
  });

  it('say how far from the best the plan can be, and how the check compares', () => {
    expect(gapSentence(makeResult())).toContain('no plan within these limits can expect fewer than 1.498');
    expect(checkSentence(makeResult()).replaceAll('\u202f', ' ')).toContain('0.020 % apart');
  });
});

describe('a computed plan', () => {
  it('shows the answer, the set-points on table roles, and what it is not', async () => {
    server();
    screenOf();
    expect(await screen.findByRole('heading', { level: 1, name: 'Plan from 7 December 2026' })).toBeVisible();
    const table = screen.getByRole('table', { name: 'Set-points in litres per second' });
    const headers = within(table)
      .getAllByRole('columnheader')
      .map((header) => header.textContent);
    expect(headers).toEqual(['Well', 'Last', 'Changewk 1', '7 Decwk 1', '14 Decwk 2']);
    const rows = within(table)
      .getAllByRole('row')
      .map((row) => row.textContent);
    // Producers first; each rate with what holds it.
    expect(rows[1]).toBe('HF-1producer42.0−4.038.0ramp34.5min');
    expect(rows[2]).toBe('HF-4injector30.0−4.026.0ramp22.5');
    expect(rows[3]).toBe('HF-10injector12.00.012.0fixed12.0fixed');
    expect(rows[5]).toBe('Injected42.0−4.038.034.5');
    expect(screen.getByText(/Decision support only/)).toBeVisible();
    expect(screen.getByText(/about the model, not the ground/)).toBeVisible();
    expect(screen.queryByText(/stress shadow/)).toBeNull();
  });

  it('compares with holding and says what that breaks', async () => {
    server();
    screenOf();
    const table = await screen.findByRole('table', { name: /other ways/ });
    expect(within(table).getByRole('row', { name: /background/ }).textContent).toContain('1.08');
    expect(screen.getByText(/passes its ceiling by up to 98.0 MWh/)).toBeVisible();
  });

  it('warns where the quiet is borrowed', async () => {
    server({ [`GET ${PLAN}`]: () => makePlan({ result: makeResult({ stressShadow: true }) }) });
    screenOf();
    expect(await screen.findByText(/stress shadow/)).toBeVisible();
  });

  it('has the numbers behind each chart', async () => {
    server();
    screenOf();
    await userEvent.click(
      await screen.findByRole('button', { name: 'Show as table: Energy per week against target' }),
    );
    const table = screen.getByRole('table', { name: 'Energy per week against target' });
    expect(within(table).getAllByRole('row')[1]?.textContent?.replaceAll('\u202f', ' ')).toBe(
      '7 Dec9,000 MWh8,900 MWh9,100 MWh101.1 %',
    );
  });

  it('keeps the chosen well in the address', async () => {
    server();
    screenOf();
    await userEvent.click(await screen.findByRole('radio', { name: 'HF-4' }));
    expect(router.setParams).toHaveBeenCalledWith({ well: 'HF-4' });
  });

  it('withdraws only after asking', async () => {
    const { of } = server({ [`POST ${PLAN}/withdraw`]: () => makePlan().plan });
    screenOf();
    await userEvent.click(await screen.findByRole('button', { name: 'Withdraw the plan' }));
    const dialog = await screen.findByRole('dialog', { name: 'Withdraw plan 3?' });
    expect(of(`${PLAN}/withdraw`)).toHaveLength(0);
    await userEvent.click(within(dialog).getByRole('button', { name: 'Withdraw' }));
    await waitFor(() => expect(of(`${PLAN}/withdraw`)).toHaveLength(1));
  });
});

describe('a plan under way', () => {
  it('shows what it does, how far it is, how long it may take, and stops on request', async () => {
    const { of } = server({
      [`GET ${PLAN}`]: () => unfinished('running'),
      [`POST ${JOB}/cancel`]: () => makeJob({ state: 'cancelled', can: { cancel: false } }),
    });
    screenOf();
    expect(await screen.findByText('Searching for the quietest plan')).toBeVisible();
    expect(screen.getByRole('progressbar')).toHaveAttribute('aria-valuenow', '42');
    expect(screen.getByText('About 20 seconds left')).toBeVisible();
    await userEvent.click(screen.getByRole('button', { name: 'Cancel' }));
    await waitFor(() => expect(of(`${JOB}/cancel`)).toHaveLength(1));
  });

  it('becomes the plan when the job is done', async () => {
    let isDone = false;
    server({
      [`GET ${PLAN}`]: () => (isDone ? makePlan() : unfinished('running')),
      [`GET ${JOB}`]: () => {
        const job = makeJob(isDone ? { state: 'done', progress: 1, can: { cancel: false } } : {});
        isDone = true;
        return job;
      },
    });
    screenOf();
    expect(await screen.findByRole('heading', { name: 'Set-points' }, { timeout: 10_000 })).toBeVisible();
  });
});

describe('a plan that did not come about', () => {
  it('gives the limits that collide and the way to try again', async () => {
    const failure = {
      code: 'NO_PLAN',
      message: 'No plan keeps every limit. These collide:',
      details: ['The heat target in week 1 is out of reach: it would have to be 120 MWh lower.'],
    };
    server({
      [`GET ${PLAN}`]: () => unfinished('failed'),
      [`GET ${JOB}`]: () => makeJob({ state: 'failed', failure, can: { cancel: false } }),
    });
    screenOf();
    expect(await screen.findByText(failure.message)).toBeVisible();
    expect(screen.getByText(failure.details[0]!)).toBeVisible();
    await userEvent.click(screen.getByRole('button', { name: 'Build again' }));
    expect(addressOf(router.push.mock.calls[0]?.[0])).toBe('/fields/field-1/plans/new?like=plan-1');
  });

  it('offers nothing to somebody who may not see it', async () => {
    server({
      [`GET ${PLAN}`]: () => ({
        status: 403,
        body: refusal('NOT_ALLOWED', 'You are not a member of this field.'),
      }),
    });
    screenOf();
    expect(await screen.findByText('You may not see this')).toBeVisible();
    expect(screen.getByText('You are not a member of this field.')).toBeVisible();
    expect(screen.queryByRole('button', { name: 'Try again' })).toBeNull();
  });

  it('lets people try again when the server was away', async () => {
    let isAway = true;
    server({
      [`GET ${PLAN}`]: () =>
        isAway ? { status: 500, body: refusal('INTERNAL', 'Something went wrong.') } : makePlan(),
    });
    screenOf();
    const again = await screen.findByRole('button', { name: 'Try again' }, { timeout: 10_000 });
    isAway = false;
    await userEvent.click(again);
    expect(await screen.findByRole('heading', { name: 'Set-points' })).toBeVisible();
  });
});
