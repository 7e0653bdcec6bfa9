import { createElement, isValidElement, cloneElement, type ReactNode } from 'react';
import { vi } from 'vitest';

/** The router of a test: one address, and a record of where people were sent. */
export const router = {
  pathname: '/fields/field-1/plans/plan-1',
  params: {} as Record<string, string>,
  push: vi.fn(),
  replace: vi.fn(),
  setParams: vi.fn((params: Record<string, string>) => Object.assign(router.params, params)),
};

export function addressOf(href: unknown): string {
  if (typeof href === 'string') return href;
  const { pathname, params = {} } = href as { pathname: string; params?: Record<string, string> };
  const used = new Set<string>();
  const path = pathname.replace(/\[(\w+)\]/g, (_all, name: string) => {
    used.add(name);
    return params[name] ?? '';
  });
  const rest = Object.entries(params).filter(([name]) => !used.has(name));
  return rest.length === 0 ? path : `${path}?${new URLSearchParams(rest).toString()}`;
}

export const expoRouter = {
  useRouter: () => router,
  usePathname: () => router.pathname,
  useLocalSearchParams: () => router.params,
  useGlobalSearchParams: () => router.params,
  Redirect: ({ href }: { href: unknown }) => createElement('p', null, `Sent to ${addressOf(href)}`),
  Link: ({ href, children }: { href: unknown; children: ReactNode }) =>
    isValidElement(children) ? cloneElement(children, { href: addressOf(href) } as object) : children,
};
