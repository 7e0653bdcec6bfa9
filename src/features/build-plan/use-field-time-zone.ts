import { useQuery } from '@tanstack/react-query';

import { callEndpoint } from '../../api/client';
import { keys } from '../../api/keys';
import { listFields } from '../../contract/fields';

/** Weeks start on the site's own Monday. */
export const useFieldTimeZone = (fieldId: string) =>
  useQuery({
    queryKey: keys.fields,
    queryFn: ({ signal }) => callEndpoint(listFields, { signal }),
    select: (reply) => reply.fields.find((field) => field.id === fieldId)?.timeZone ?? 'UTC',
  });
