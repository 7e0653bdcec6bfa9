/** Every table by name, for the query builder and the sign-in library. */
import { audit } from './audit';
import { fields, memberships, outages, reservoirModelVersions, wells, zones } from './fields';
import { jobs } from './jobs';
import { accounts, people, sessions, verifications } from './people';
import { planForecastWeeks, planRates, planResults, plans } from './plans';
import { heatTargets, meteredRates, seismicEvents } from './readings';

export const schema = {
  accounts,
  audit,
  fields,
  heatTargets,
  jobs,
  memberships,
  meteredRates,
  outages,
  people,
  planForecastWeeks,
  planRates,
  planResults,
  plans,
  reservoirModelVersions,
  seismicEvents,
  sessions,
  verifications,
  wells,
  zones,
};
