import { useQuery } from '@tanstack/react-query';

import { callEndpoint } from '../../api/client';
import { keys } from '../../api/keys';
import { getHealth } from '../../contract/health';

export const useHealth = () =>
  useQuery({ queryKey: keys.health, queryFn: ({ signal }) => callEndpoint(getHealth, { signal }) });
