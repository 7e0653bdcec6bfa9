/**
 * Rates on the set-point step, no limit broken, the balance kept within one step in total.
 *
 *   min gradient·(x − x°)  subject to the limits, x = step·n, n one of the whole numbers near x°/step
 *   (x° the plan as it stands)
 *
 * Method    Mixed-integer program on the linearised objective (over half a step it is as good as linear); a
 *           well-week whose bounds hold no multiple of the step stays free. First the two nearest multiples in
 *           exact balance, then four, then with one step left over.
 * Units     the program's own (cutting-plane.ts)
 */
import { StoppedError } from '../errors';
import { LinearProgram, linearSolver } from './linear-program';
import { RATE_SCALE, type ControlColumns, type LimitRow } from './plan-limits';
import { totalAt } from './cutting-plane';
import type { PlanProgram } from './plan-program';

const MOST_NODES = 400;
/** Of the plan's events: closer than this nobody can tell. */
const RELATIVE_GAP = 1e-4;
const MOST_ROW_PASSES = 20;
const NEAR = 1e-9;

interface Freedom {
  /** Multiples of the step allowed beyond the two nearest, on either side. */
  reach: number;
  /** What injection and production may differ by. */
  stepsLeftOver: number;
}

const FREEDOMS: Freedom[] = [
  { reach: 0, stepsLeftOver: 0 },
  { reach: 1, stepsLeftOver: 0 },
  { reach: 1, stepsLeftOver: 1 },
];

/**
 * @param rows limits as rows, those of pressures found so far included
 * @returns null where no rounded plan keeps the limits
 */
export async function roundToSetPoints(
  program: PlanProgram,
  columns: ControlColumns,
  rows: readonly LimitRow[],
  x: Float64Array,
  setPointStepM3PerS: number,
  shouldStop?: () => boolean,
): Promise<Float64Array | null> {
  const here = program.evaluate(x);
  const value = Math.abs(totalAt(program, x, here));
  const gradient = x.map((_, v) =>
    here.gradients.reduce((total, part) => total + part[v], program.cost?.[v] ?? 0),
  );
  const known = [...rows, ...((here.limitRows ?? []) as LimitRow[])];
  for (const freedom of FREEDOMS) {
    const rounded = await roundWithin(
      program,
      columns,
      known,
      x,
      gradient,
      value,
      setPointStepM3PerS,
      freedom,
      shouldStop,
    );
    if (rounded) return rounded;
  }
  return null;
}

async function roundWithin(
  program: PlanProgram,
  columns: ControlColumns,
  rows: readonly LimitRow[],
  x: Float64Array,
  gradient: Float64Array,
  value: number,
  setPointStepM3PerS: number,
  { reach, stepsLeftOver }: Freedom,
  shouldStop?: () => boolean,
): Promise<Float64Array | null> {
  const step = setPointStepM3PerS / RATE_SCALE;
  const lp = new LinearProgram(await linearSolver());
  try {
    // Columns are n − floor(x°/step) where a multiple fits, x itself elsewhere; `origin` and `unit` lead back to x.
    const origin = new Float64Array(x.length);
    const unit = new Float64Array(x.length);
    for (let v = 0; v < x.length; v++) {
      const least = Math.ceil(columns.lower[v] / step - NEAR);
      const most = Math.floor(columns.upper[v] / step + NEAR);
      if (least > most || columns.outage[v]) {
        unit[v] = 1;
        lp.addColumn(gradient[v] / value, columns.lower[v], columns.upper[v]);
        continue;
      }
      const at = x[v] / step;
      const isWhole = Math.abs(at - Math.round(at)) < 1e-6;
      const below = isWhole ? Math.round(at) : Math.floor(at);
      const low = Math.min(most, Math.max(least, below - reach));
      const high = Math.max(least, Math.min(most, (isWhole ? below : below + 1) + reach));
      origin[v] = low * step;
      unit[v] = step;
      lp.setInteger(lp.addColumn((gradient[v] * step) / value, 0, high - low));
    }
    const addRow = (row: LimitRow) => {
      let shift = 0;
      row.indices.forEach((v, entry) => (shift += row.values[entry] * origin[v]));
      const give = row.limit.name === 'massBalance' ? stepsLeftOver * step : 0;
      const values = row.values.map((entry, at) => entry * unit[row.indices[at]]);
      const scale = Math.max(...values.map(Math.abs), 1e-9);
      lp.addRow({
        lower: (row.lower - give - shift) / scale,
        upper: (row.upper + give - shift) / scale,
        indices: row.indices,
        values: values.map((entry) => entry / scale),
      });
    };
    for (const row of rows) addRow(row);
    lp.limitSearch(RELATIVE_GAP, MOST_NODES);
    for (let pass = 0; pass < MOST_ROW_PASSES; pass++) {
      if (shouldStop?.()) throw new StoppedError();
      const answer = lp.solve();
      if (!answer) return null;
      const rounded = x.map((_, v) => {
        if (unit[v] === 1) return Math.min(columns.upper[v], Math.max(columns.lower[v], answer.x[v]));
        return (Math.round(origin[v] / step) + Math.round(answer.x[v])) * step;
      });
      const broken = (program.violatedRows?.(rounded) ?? []) as LimitRow[];
      if (broken.length === 0) {
        const { breaksLimit, limitRows = [] } = program.evaluate(rounded);
        if (!breaksLimit) return rounded;
        broken.push(...(limitRows as LimitRow[]));
      }
      for (const row of broken) addRow(row);
    }
    return null;
  } finally {
    lp.dispose();
  }
}
