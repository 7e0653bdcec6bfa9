import '@testing-library/jest-dom/vitest';
import { cleanup } from '@testing-library/react';
import { afterEach, beforeEach, vi } from 'vitest';

/** What a browser has and the test's page lacks; nothing changes its size. */
class StillResizeObserver {
  observe() {}
  unobserve() {}
  disconnect() {}
}

globalThis.ResizeObserver ??= StillResizeObserver as never;
Object.assign(globalThis, { __DEV__: false });
window.matchMedia ??= ((query: string) => ({
  matches: false,
  media: query,
  addEventListener() {},
  removeEventListener() {},
  addListener() {},
  removeListener() {},
})) as never;

// Typing letter by letter into a whole screen takes its time on a busy machine.
vi.setConfig({ testTimeout: 30_000 });

beforeEach(() => {
  // A screen that complains is a screen with a fault.
  vi.spyOn(console, 'error').mockImplementation((...words: unknown[]) => {
    throw new Error(`console.error: ${words.map(String).join(' ')}`);
  });
});

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
  vi.unstubAllGlobals();
});
