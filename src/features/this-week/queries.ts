import { useQuery } from '@tanstack/react-query';

import { callEndpoint } from '../../api/client';
import { keys } from '../../api/keys';
import { getFieldWeek } from '../../contract/fields';

export const useFieldWeek = (fieldId: string) =>
  useQuery({
    queryKey: keys.fieldWeek(fieldId),
    queryFn: ({ signal }) => callEndpoint(getFieldWeek, { params: { fieldId }, signal }),
  });
