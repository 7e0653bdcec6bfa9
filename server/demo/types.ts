import type { ReservoirSpec, SeismicitySpec, WellSpec } from '../../models/scenario/types';

/** A demonstration field as plain data: what a real field would have entered and measured. */
export interface DemoField {
  name: string;
  place: string;
  /** IANA zone of the site; weeks start on its Monday 00:00. */
  timeZone: string;
  reservoir: ReservoirSpec;
  seismicity: SeismicitySpec;
  wells: WellSpec[];
  monitors: { name: string; xM: number; yM: number }[];
  /** Metered weekly mean rates, magnitudes; oldest first, complete weeks only. */
  weeklyRates: { well: string; weekStartsAt: number; rateM3PerS: number }[];
  /** Located events of M ≥ completeness. */
  events: {
    publicId: string;
    at: number;
    xM: number;
    yM: number;
    depthM: number;
    magnitude: number;
    magnitudeType: string;
  }[];
  /** Heat sold, J per week, from the current week on (26 entries). */
  heatTargetJPerWeek: number[];
  /** Weekly limit on the rate multiple that the operator works to (shown in charts). */
  rateMultipleLimit: number;
}
