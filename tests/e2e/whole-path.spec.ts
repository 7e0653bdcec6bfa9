import { readFileSync } from 'node:fs';

import { expect, expectSoundPage, NOT_SIGNED_IN, personOf, signIn, test } from './support';

test.use({ expected: { failures: NOT_SIGNED_IN } });

test('from sign-in to a plan', async ({ page }, { project }) => {
  // Each size asks for weeks of its own, so that both watch a plan being computed.
  const name = `Quiet weeks, ${project.name}`;
  const weeks = project.name === 'phone' ? '6' : '8';

  await test.step('sign in', async () => {
    await page.goto('/');
    await expect(page.getByRole('heading', { name: 'Sign in', level: 1 })).toBeVisible();
    await expectSoundPage(page);
    await signIn(page, 'fieldEngineer');
  });

  await test.step('fields', async () => {
    await page.goto('/fields');
    await expect(page.getByRole('heading', { name: 'Fields', level: 1 })).toBeVisible();
    await expect(page.getByRole('link', { name: 'Harrow Fen, this week' })).toBeVisible();
    await expectSoundPage(page);
    await page.getByRole('link', { name: 'Harrow Fen, this week' }).click();
  });

  await test.step('this week', async () => {
    await expect(page.getByRole('heading', { name: 'This week', level: 1 })).toBeVisible();
    await expect(page.getByRole('heading', { name: 'The weekly loop' })).toBeVisible();
    await expectSoundPage(page);
    await page.getByRole('button', { name: 'Build the plan' }).click();
  });

  await test.step('ask for the plan', async () => {
    await expect(page.getByRole('heading', { name: 'Build a plan', level: 1 })).toBeVisible();
    await page.getByLabel('Weeks to plan').fill(weeks);
    await page.getByRole('textbox', { name: 'Name', exact: true }).fill(name);
    const answer = page.getByRole('status', { name: 'Whether the target can be met' });
    await expect(answer).toContainText('The rates can deliver every target.');
    await expectSoundPage(page);
    await page.getByRole('button', { name: 'Build the plan' }).click();
  });

  await test.step('watch it being computed', async () => {
    await expect(page.getByRole('heading', { name, level: 1 })).toBeVisible();
    await expect(page.getByRole('progressbar', { name: 'Progress of the plan' })).toBeVisible();
    await expectSoundPage(page);
  });

  await test.step('read it', async () => {
    await expect(page.getByRole('heading', { name: 'Set-points' })).toBeVisible({ timeout: 90_000 });
    const rates = page.getByRole('table', { name: 'Set-points in litres per second' });
    await expect(rates).toContainText('HF-1');
    for (const part of ['Forecast', 'Energy against target', 'What binds', 'How good, how sure']) {
      await expect(page.getByRole('heading', { name: part, exact: true })).toBeVisible();
    }
    await expect(page.getByText(/Decision support only/)).toBeVisible();
    await expectSoundPage(page);
  });

  await test.step('the address alone leads back to it', async () => {
    await page.reload();
    await expect(page.getByRole('heading', { name, level: 1 })).toBeVisible();
    await expect(page.getByRole('heading', { name: 'Set-points' })).toBeVisible();
  });

  await test.step('its scenario is a file that the command line reads', async () => {
    const download = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Download the scenario' }).click();
    const scenario = JSON.parse(readFileSync(await (await download).path(), 'utf8'));
    expect(scenario).toMatchObject({ format: 'stillfield-scenario/1', plan: { weeks: Number(weeks) } });
  });

  await test.step('it is in the list', async () => {
    await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'Plans' }).click();
    await expect(page.getByRole('link', { name: new RegExp(name) }).first()).toBeVisible();
    await expectSoundPage(page);
  });

  await test.step('sign out', async () => {
    await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'More' }).click();
    await expect(page.getByRole('heading', { name: 'More', level: 1 })).toBeVisible();
    await expect(page.getByText(personOf('fieldEngineer').email).first()).toBeVisible();
    await expectSoundPage(page);
    await page.getByRole('button', { name: 'Sign out' }).click();
    await expect(page.getByRole('heading', { name: 'Sign in', level: 1 })).toBeVisible();
  });
});

test('a plan that is stopped says so and can be asked for again', async ({ page }, { project }) => {
  const name = `Stopped, ${project.name}`;
  await signIn(page, 'fieldEngineer');
  await page.getByRole('button', { name: 'Build the plan' }).click();
  await page.getByLabel('Weeks to plan').fill(project.name === 'phone' ? '25' : '26');
  await page.getByRole('textbox', { name: 'Name', exact: true }).fill(name);
  await page.getByRole('button', { name: 'Build the plan' }).click();
  await expect(page.getByRole('heading', { name, level: 1 })).toBeVisible();
  await page.getByRole('button', { name: 'Cancel' }).click();
  await expect(page.getByText('This plan was cancelled')).toBeVisible();
  await expectSoundPage(page);
  await page.getByRole('button', { name: 'Build again' }).click();
  await expect(page.getByLabel('Weeks to plan')).toHaveValue(project.name === 'phone' ? '25' : '26');
});

test('a target that cannot be met is told while it is typed', async ({ page }) => {
  await signIn(page, 'fieldEngineer');
  await page.getByRole('button', { name: 'Build the plan' }).click();
  await page.getByRole('radio', { name: 'Same every week' }).click();
  await page.getByLabel(/^Energy per week/).fill('900000');
  const answer = page.getByRole('status', { name: 'Whether the target can be met' });
  await expect(answer).toContainText(
    /^Week 1 can deliver at most [\d,]+ MWh: [\d,]+ MWh short of the target\./,
  );
  await expectSoundPage(page);
});
