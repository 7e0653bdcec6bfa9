import { useQuery } from '@tanstack/react-query';

import { listFields } from '../contract/fields';
import { callEndpoint } from './client';
import { keys } from './keys';

export const useFields = () =>
  useQuery({
    queryKey: keys.fields,
    queryFn: ({ signal }) => callEndpoint(listFields, { signal }),
    select: (reply) => reply.fields,
  });

/** Weeks start on the site's own Monday. */
export const useFieldTimeZone = (fieldId: string) =>
  useQuery({
    queryKey: keys.fields,
    queryFn: ({ signal }) => callEndpoint(listFields, { signal }),
    select: (reply) => reply.fields.find((field) => field.id === fieldId)?.timeZone ?? 'UTC',
  });
