import { useQuery } from '@tanstack/react-query';

import { callEndpoint } from '../../api/client';
import { keys } from '../../api/keys';
import { listFields } from '../../contract/fields';

export const useFields = () =>
  useQuery({
    queryKey: keys.fields,
    queryFn: ({ signal }) => callEndpoint(listFields, { signal }),
    select: (reply) => reply.fields,
  });
