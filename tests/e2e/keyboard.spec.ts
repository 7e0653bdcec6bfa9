import { expect, expectVisibleFocus, NOT_SIGNED_IN, personOf, tabTo, test } from './support';

test.use({ expected: { failures: NOT_SIGNED_IN } });

test('signing in and building a plan with the keyboard alone', async ({ page }, { project }) => {
  const { email, password } = personOf('fieldEngineer');
  await page.goto('/');
  await tabTo(page, page.getByLabel('E-mail'));
  await page.keyboard.type(email);
  await tabTo(page, page.getByLabel('Password', { exact: true }));
  await page.keyboard.type(password);
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name: 'This week', level: 1 })).toBeVisible();

  const build = page.getByRole('button', { name: 'Build the plan' });
  await tabTo(page, build);
  await expectVisibleFocus(page);
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name: 'Build a plan', level: 1 })).toBeVisible();

  const name = `By keyboard, ${project.name}`;
  await tabTo(page, page.getByLabel('Weeks to plan'));
  await page.keyboard.press('Control+A');
  await page.keyboard.type(project.name === 'phone' ? '3' : '4');
  await tabTo(page, page.getByRole('textbox', { name: 'Name', exact: true }));
  await page.keyboard.press('Control+A');
  await page.keyboard.type(name);
  await tabTo(page, build);
  await expectVisibleFocus(page);
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name, level: 1 })).toBeVisible();
  await expect(page.getByRole('heading', { name: 'Set-points' })).toBeVisible({ timeout: 90_000 });
});

test('the first Tab leads past the navigation', async ({ page }) => {
  const { email, password } = personOf('hseOfficer');
  await page.goto('/');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.keyboard.press('Enter');
  await expect(page.getByRole('heading', { name: 'This week', level: 1 })).toBeVisible();
  await page.reload();
  await expect(page.getByRole('heading', { name: 'This week', level: 1 })).toBeVisible();
  await page.keyboard.press('Tab');
  await expect(page.getByRole('link', { name: 'Skip to the content' })).toBeFocused();
  await expectVisibleFocus(page);
  await page.keyboard.press('Enter');
  await expect(page.getByRole('main')).toBeFocused();
});
