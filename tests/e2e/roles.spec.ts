import type { Page } from '@playwright/test';

import { expect, expectSoundPage, NOT_SIGNED_IN, personOf, signIn, test } from './support';

const fieldIdOf = (page: Page) => new URL(page.url()).pathname.split('/')[2]!;

test.describe('a production lead', () => {
  test.use({ expected: { failures: NOT_SIGNED_IN } });

  test('reads everything and is offered no plan to build', async ({ page }) => {
    await signIn(page, 'productionLead');
    await expect(page.getByRole('heading', { name: 'The weekly loop' })).toBeVisible();
    await expect(page.getByRole('button', { name: 'Build the plan' })).toHaveCount(0);
    await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'Plans' }).click();
    await expect(page.getByRole('heading', { name: 'Plans', level: 1 }).first()).toBeVisible();
    await expect(page.getByRole('button', { name: /Build/ })).toHaveCount(0);
    await expectSoundPage(page);
  });
});

test.describe('refused by the server', () => {
  test.use({ expected: { failures: [...NOT_SIGNED_IN, /403/] } });

  test('a production lead is told why on the address of the form', async ({ page }) => {
    await signIn(page, 'productionLead');
    await page.goto(`/fields/${fieldIdOf(page)}/plans/new`);
    await expect(page.getByText(/Only a field engineer builds plans/)).toBeVisible();
    await expect(page.getByRole('button', { name: 'Build the plan' })).toHaveCount(0);
    await expectSoundPage(page);
  });

  test('a production lead who asks the server itself', async ({ page }) => {
    await signIn(page, 'productionLead');
    const status = await page.evaluate(async (fieldId) => {
      const response = await fetch(`/api/fields/${fieldId}/plans`, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({
          name: 'Past the page',
          firstWeekStartsAt: Date.now(),
          weeks: 1,
          lookAheadWeeks: 0,
          objective: 'quietest',
          heatTargetJPerWeek: [1e13],
          heatBand: 0.02,
        }),
      });
      return response.status;
    }, fieldIdOf(page));
    expect(status).toBe(403);
  });
});

test.describe('signing in', () => {
  test.use({ expected: { failures: [...NOT_SIGNED_IN, /401/] } });

  test('with a wrong password says so and keeps the address', async ({ page }) => {
    const { email } = personOf('hseOfficer');
    await page.goto('/');
    await page.getByLabel('E-mail').fill(email);
    await page.getByLabel('Password', { exact: true }).fill('not the password');
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await expect(page.getByRole('alert')).toContainText('E-mail or password is not right.');
    await expect(page.getByLabel('E-mail')).toHaveValue(email);
    await expectSoundPage(page);
  });

  test('leads on to the page that was asked for', async ({ page }) => {
    await signIn(page, 'hseOfficer');
    const plans = `/fields/${fieldIdOf(page)}/plans`;
    await page.context().clearCookies();
    await page.goto(plans);
    const { email, password } = personOf('hseOfficer');
    await page.getByLabel('E-mail').fill(email);
    await page.getByLabel('Password', { exact: true }).fill(password);
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await expect(page.getByRole('heading', { name: 'Plans', level: 1 }).first()).toBeVisible();
    expect(new URL(page.url()).pathname).toBe(plans);
  });

  test('with one tap in the demonstration', async ({ page }) => {
    await page.goto('/');
    await page.getByRole('button', { name: /^Sign in as .*, HSE officer$/i }).click();
    await expect(page.getByRole('heading', { name: 'This week', level: 1 })).toBeVisible();
  });
});

test.describe('an address that is not there', () => {
  test.use({ expected: { failures: [...NOT_SIGNED_IN, /404/] } });

  test('says so', async ({ page }) => {
    await signIn(page, 'hseOfficer');
    await page.goto('/nowhere');
    await expect(page.getByRole('heading', { level: 1 })).toHaveText('Page not found');
    await expectSoundPage(page);
  });

  test('a field of somebody else is not there either', async ({ page }) => {
    await signIn(page, 'hseOfficer');
    await page.goto('/fields/somebody-elses');
    await expect(page.getByText(/was not found/)).toBeVisible();
    await expectSoundPage(page);
  });
});
