import { getHealth, getOpenApi } from '../../../src/contract/health';
import { publicEndpoint } from '../../http/endpoint';
import { openApiDocument } from '../../http/open-api';
import { mayLookFromOutside } from './policy';
import { readHealth } from './service';

export const healthEndpoints = {
  getHealth: publicEndpoint(getHealth, {
    load: () => null,
    policy: mayLookFromOutside,
    act: ({ context }) => readHealth(context),
  }),
  getOpenApi: publicEndpoint(getOpenApi, {
    load: () => null,
    policy: mayLookFromOutside,
    act: ({ context }) => openApiDocument(context.version),
  }),
};
