import { AxeBuilder } from '@axe-core/playwright';
import { expect, test as base, type Locator, type Page } from '@playwright/test';

import { DEMO_PEOPLE } from '../../server/demo/people';
import type { Role } from '../../src/contract/enums';

/**
 * react-native-web has no native driver for animations and says so once; nothing is wrong. Everything else
 * that the browser or the libraries complain about counts.
 */
const HARMLESS = [/^warning: Animated: `useNativeDriver` is not supported/];

/** A page on which nothing may go wrong unseen: errors, warnings and broken requests fail the test. */
export const test = base.extend<{ expected: { failures: RegExp[] } }>({
  expected: [{ failures: [] }, { option: true }],
  page: async ({ page, expected }, use) => {
    const troubles: string[] = [];
    page.on('console', (message) => {
      if (['error', 'warning'].includes(message.type()))
        troubles.push(`${message.type()}: ${message.text()}`);
    });
    page.on('pageerror', (error) => troubles.push(`uncaught: ${error.message}`));
    page.on('response', (response) => {
      if (response.status() >= 400) troubles.push(`${response.status()} ${response.url()}`);
    });
    await use(page);
    const known = [...HARMLESS, ...expected.failures];
    const unexpected = troubles.filter((text) => !known.some((pattern) => pattern.test(text)));
    expect(unexpected).toEqual([]);
  },
});

export { expect };

/** The app asks who is signed in before it shows the sign-in page; the browser notes the answer. */
export const NOT_SIGNED_IN = [/401 .*\/api\/me$/, /error: Failed to load resource.*401/];

export const personOf = (role: Role) => DEMO_PEOPLE.find((person) => person.role === role)!;

export async function signIn(page: Page, role: Role): Promise<void> {
  const { email, password } = personOf(role);
  await page.goto('/');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByRole('heading', { name: 'This week', level: 1 })).toBeVisible();
}

/** What can be checked on every page without knowing it: axe, and that only tables scroll sideways. */
export async function expectSoundPage(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'best-practice'])
    .analyze();
  const found = violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target).join(' | ')}`);
  expect(found).toEqual([]);
  const overflow = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
  expect(overflow).toBeLessThanOrEqual(0);
}

/** Goes on with the Tab key, as somebody without a mouse does. */
export async function tabTo(page: Page, target: Locator): Promise<void> {
  for (let presses = 0; presses < 80; presses++) {
    await page.keyboard.press('Tab');
    if (await target.evaluate((element) => element === document.activeElement)) return;
  }
  throw new Error('The Tab key does not lead there.');
}

/** Whether the focused element can be told from the others. */
export async function expectVisibleFocus(page: Page): Promise<void> {
  const outline = await page.evaluate(() => {
    const { outlineStyle, outlineWidth } = getComputedStyle(document.activeElement!);
    return outlineStyle === 'none' ? 0 : parseFloat(outlineWidth);
  });
  expect(outline).toBeGreaterThan(0);
}
