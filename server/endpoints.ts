import type { EndpointId } from '../src/contract/index';
import { fieldEndpoints } from './features/fields/routes';
import { healthEndpoints } from './features/health/routes';
import { jobEndpoints } from './features/jobs/routes';
import { peopleEndpoints } from './features/people/routes';
import { planEndpoints } from './features/plans/routes';
import type { BoundEndpoint } from './http/endpoint';

/** Every endpoint of the contract with what answers it; a missing one does not compile. */
export const boundEndpoints: Record<EndpointId, BoundEndpoint> = {
  ...healthEndpoints,
  ...peopleEndpoints,
  ...fieldEndpoints,
  ...planEndpoints,
  ...jobEndpoints,
};
