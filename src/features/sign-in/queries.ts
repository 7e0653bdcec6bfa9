import { useQuery } from '@tanstack/react-query';

import { callEndpoint } from '../../api/client';
import { keys } from '../../api/keys';
import { listDemoSignIns } from '../../contract/people';

/** Only a demonstration server has any. */
export const useDemoSignIns = () =>
  useQuery({
    queryKey: keys.demoSignIns,
    queryFn: ({ signal }) => callEndpoint(listDemoSignIns, { signal }),
    select: (reply) => reply.signIns,
    staleTime: Infinity,
  });
