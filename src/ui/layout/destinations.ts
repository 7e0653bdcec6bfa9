import type { Href } from 'expo-router';

import type { IconName } from '../icon';

export interface Destination {
  name: string;
  icon: IconName;
  href: Href;
  isCurrent: boolean;
}

/** Above the fields there is only the list of them. */
export const OUTSIDE_FIELDS: Destination[] = [
  { name: 'Fields', icon: 'fields', href: '/fields', isCurrent: true },
];

/** Where one can go inside a field. */
export function destinationsOf(fieldId: string, pathname: string): Destination[] {
  const home = `/fields/${fieldId}` as const;
  const isUnder = (path: string) => pathname === path || pathname.startsWith(`${path}/`);
  return [
    {
      name: 'This week',
      icon: 'week',
      href: { pathname: '/fields/[fieldId]', params: { fieldId } },
      isCurrent: pathname === home,
    },
    {
      name: 'Plans',
      icon: 'plans',
      href: { pathname: '/fields/[fieldId]/plans', params: { fieldId } },
      isCurrent: isUnder(`${home}/plans`),
    },
    {
      name: 'More',
      icon: 'more',
      href: { pathname: '/fields/[fieldId]/more', params: { fieldId } },
      isCurrent: isUnder(`${home}/more`),
    },
  ];
}
