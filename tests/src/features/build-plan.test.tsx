import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, expect, it, vi } from 'vitest';

import { BuildPlanScreen } from '../../../src/features/build-plan/build-plan-screen';
import { formFrom, numberFrom, planForm, requestFrom } from '../../../src/features/build-plan/plan-form';
import { fakeServer, refusal } from '../support/fake-server';
import { addressOf, router } from '../support/router-stub';
import { show } from '../support/show';
import { field, makeJob, makePlan, me, MONDAY, ZONE } from '../support/things';

vi.mock('expo-router', async () => (await import('../support/router-stub')).expoRouter);

const MEGAWATT_HOUR = 3.6e9;
const request = {
  ...makePlan().request,
  weeks: 3,
  heatTargetJPerWeek: [8900, 8900, 8900].map((value) => value * MEGAWATT_HOUR),
};
const BUILD = '/api/fields/field-1/plans';
const CHECK = '/api/fields/field-1/check-target';

function server(changes: Parameters<typeof fakeServer>[0] = {}) {
  return fakeServer({
    'GET /api/me': () => me,
    'GET /api/fields': () => ({ fields: [field] }),
    'GET /api/fields/field-1/plan-defaults': () => ({
      request,
      lastWeekHeatJ: 9240 * MEGAWATT_HOUR,
      typicalSeconds: 22,
    }),
    [`POST ${CHECK}`]: ({ body }) => {
      const isMet = body.heatTargetJPerWeek[0] <= 10_000 * MEGAWATT_HOUR;
      return {
        feasible: isMet,
        mostHeatJ: [10_000 * MEGAWATT_HOUR],
        leastHeatJ: [8000 * MEGAWATT_HOUR],
        sentence: isMet ? 'The rates can deliver every target.' : 'Week 1 can deliver at most 10,000 MWh.',
      };
    },
    [`POST ${BUILD}`]: () => ({
      status: 202,
      body: { planId: 'plan-9', job: makeJob({ planId: 'plan-9' }) },
    }),
    ...changes,
  });
}

beforeEach(() => vi.clearAllMocks());

it('reads numbers as people type them', () => {
  expect(numberFrom('3,410.5')).toBe(3410.5);
  expect(numberFrom('3 410')).toBe(3410);
  expect(numberFrom('')).toBeNaN();
  expect(numberFrom('twelve')).toBeNaN();
});

it('gives back the request that it was filled from', () => {
  const form = formFrom(request, MONDAY, ZONE);
  expect(planForm.safeParse(form).success).toBe(true);
  expect(requestFrom(form, MONDAY, ZONE)).toEqual({
    ...request,
    // One value for all weeks, since they are the same.
    heatTargetJPerWeek: [8900 * MEGAWATT_HOUR],
  });
});

it('keeps different weeks apart', () => {
  const targets = [8900, 9000, 9100].map((value) => value * MEGAWATT_HOUR);
  const form = formFrom({ ...request, heatTargetJPerWeek: targets }, MONDAY, ZONE);
  expect(form.targetKind).toBe('perWeek');
  expect(requestFrom(form, MONDAY, ZONE).heatTargetJPerWeek).toEqual(targets);
});

it('starts from last week and says how long it takes', async () => {
  server();
  show(<BuildPlanScreen fieldId="field-1" like={null} />);
  expect(await screen.findByLabelText('Energy per week, MWh')).toHaveValue('8,900');
  expect(screen.getByRole('spinbutton', { name: 'First week' })).toHaveAttribute(
    'aria-valuetext',
    'Mon 7 Dec 2026',
  );
  expect(screen.getByText(/usually takes about 20 seconds/)).toBeVisible();
});

it('says while somebody types whether it can be met', async () => {
  server();
  show(<BuildPlanScreen fieldId="field-1" like={null} />);
  expect(await screen.findByText('The rates can deliver every target.')).toBeVisible();
  const target = screen.getByLabelText('Energy per week, MWh');
  await userEvent.clear(target);
  await userEvent.type(target, '12000');
  expect(await screen.findByText('Week 1 can deliver at most 10,000 MWh.')).toBeVisible();
});

it('does not ask the server for what cannot be read', async () => {
  const { of } = server();
  show(<BuildPlanScreen fieldId="field-1" like={null} />);
  const weeks = await screen.findByLabelText('Weeks to plan, weeks');
  await userEvent.clear(weeks);
  await userEvent.type(weeks, '40');
  await userEvent.click(screen.getByRole('button', { name: 'Build the plan' }));
  expect(await screen.findByText('Type a whole number from 1 to 26.')).toHaveAttribute('role', 'alert');
  expect(of(BUILD)).toHaveLength(0);
});

it('sends SI units with Enter and goes to the plan', async () => {
  const { of } = server();
  show(<BuildPlanScreen fieldId="field-1" like={null} />);
  const target = await screen.findByLabelText('Energy per week, MWh');
  await userEvent.clear(target);
  await userEvent.type(target, '9,000{Enter}');
  await waitFor(() => expect(router.replace).toHaveBeenCalled());
  expect(of(BUILD)[0]?.body).toMatchObject({
    firstWeekStartsAt: MONDAY,
    weeks: 3,
    heatTargetJPerWeek: [9000 * MEGAWATT_HOUR],
    heatBand: 0.02,
    objective: 'quietest',
  });
  expect(addressOf(router.replace.mock.calls[0]?.[0])).toBe('/fields/field-1/plans/plan-9');
});

it('puts what the server says at the field it is about', async () => {
  const message = 'A plan starts at most 26 weeks ahead.';
  server({
    [`POST ${BUILD}`]: () => ({
      status: 422,
      body: refusal('BAD_REQUEST', 'The first week is too far ahead.', [
        { path: 'firstWeekStartsAt', message },
        { path: 'heatTargetJPerWeek.0', message: 'Too much heat.' },
      ]),
    }),
  });
  show(<BuildPlanScreen fieldId="field-1" like={null} />);
  await userEvent.click(await screen.findByRole('button', { name: 'Build the plan' }));
  expect(await screen.findByText('The first week is too far ahead.')).toBeVisible();
  expect(screen.getByText(message)).toHaveAttribute('role', 'alert');
  expect(screen.getByText('Too much heat.')).toHaveAttribute('role', 'alert');
  expect(router.replace).not.toHaveBeenCalled();
});
