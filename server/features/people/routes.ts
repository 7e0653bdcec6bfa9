import { listMemberships } from '../../../db/store/people';
import { getMe, listDemoSignIns } from '../../../src/contract/people';
import { personEndpoint, publicEndpoint } from '../../http/endpoint';
import { mayReadDemoSignIns, mayReadSelf } from './policy';
import { presentMe } from './present';
import { demoSignIns } from './service';

export const peopleEndpoints = {
  getMe: personEndpoint(getMe, {
    load: () => null,
    policy: mayReadSelf,
    act: ({ context, who }) => presentMe(who, listMemberships(context.database.db, who.id)),
  }),
  listDemoSignIns: publicEndpoint(listDemoSignIns, {
    load: () => null,
    policy: mayReadDemoSignIns,
    act: ({ context }) => ({ signIns: [...demoSignIns(context)] }),
  }),
};
