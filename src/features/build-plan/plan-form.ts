import { z } from 'zod';

import type { PlanRequest } from '../../contract/plans';
import { fixed, joulesFromMegawattHours, megawattHours } from '../../lib/format';
import { addWeeks, weeksBetween } from '../../lib/weeks';

/** What the form holds: text as it was typed, in people's units. */
export interface PlanForm {
  name: string;
  /** Weeks after the earliest one that can be planned. */
  startsIn: number;
  weeks: string;
  lookAheadWeeks: string;
  targetKind: 'same' | 'perWeek';
  target: string;
  targets: string[];
  bandPercent: string;
  notes: string;
}

export const MOST_WEEKS = 26;
/** The server plans at most this far ahead. */
export const MOST_WEEKS_AHEAD = 25;

/** A number as people type it: "3,410.5" and "3 410.5" mean the same. */
export function numberFrom(text: string): number {
  const plain = text.replace(/[\s,\u202f\u00a0]/g, '');
  return plain === '' ? NaN : Number(plain);
}

const wholeNumber = (least: number, most: number) =>
  z.string().refine((text) => {
    const value = numberFrom(text);
    return Number.isInteger(value) && value >= least && value <= most;
  }, `Type a whole number from ${least} to ${most}.`);

const isTarget = (text: string) => numberFrom(text) > 0 && joulesFromMegawattHours(numberFrom(text)) <= 1e16;
const TARGET_ADVICE = 'Type the energy in MWh, more than 0.';

export const planForm: z.ZodType<PlanForm, PlanForm> = z
  .object({
    name: z
      .string()
      .refine((text) => text.trim() !== '', 'Give the plan a name.')
      .refine((text) => text.trim().length <= 80, 'Use at most 80 characters.'),
    startsIn: z.number().int().min(0).max(MOST_WEEKS_AHEAD),
    weeks: wholeNumber(1, MOST_WEEKS),
    lookAheadWeeks: wholeNumber(0, 52),
    targetKind: z.enum(['same', 'perWeek']),
    target: z.string(),
    targets: z.array(z.string()),
    bandPercent: z.string().refine((text) => {
      const value = numberFrom(text);
      return value >= 0.1 && value <= 50;
    }, 'Type a percentage from 0.1 to 50.'),
    notes: z.string().max(2000, 'Use at most 2,000 characters.'),
  })
  .superRefine((form, context) => {
    if (form.targetKind === 'same' && !isTarget(form.target)) {
      context.addIssue({ code: 'custom', path: ['target'], message: TARGET_ADVICE });
    }
    if (form.targetKind === 'perWeek') {
      form.targets.forEach((target, week) => {
        if (week < numberFrom(form.weeks) && !isTarget(target)) {
          context.addIssue({ code: 'custom', path: ['targets', week], message: TARGET_ADVICE });
        }
      });
    }
  });

/** Targets are typed in whole MWh, unless there is less than that to sell. */
const targetText = (joule: number) => {
  const value = megawattHours(joule);
  return fixed(value, value < 100 ? 2 : 0);
};

/** A first week that has begun meanwhile becomes the earliest one that has not. */
export function formFrom(request: PlanRequest, earliestAt: number, timeZone: string): PlanForm {
  const startsIn = weeksBetween(earliestAt, request.firstWeekStartsAt, timeZone);
  const targets = Array.from({ length: MOST_WEEKS }, (_, week) =>
    targetText(request.heatTargetJPerWeek[week] ?? request.heatTargetJPerWeek.at(-1) ?? 0),
  );
  const isSame = targets.slice(0, request.weeks).every((target) => target === targets[0]);
  return {
    name: request.name,
    startsIn: Math.max(0, Math.min(MOST_WEEKS_AHEAD, startsIn)),
    weeks: String(request.weeks),
    lookAheadWeeks: String(request.lookAheadWeeks),
    targetKind: isSame ? 'same' : 'perWeek',
    target: targets[0] ?? '',
    targets,
    bandPercent: String(Number((request.heatBand * 100).toPrecision(6))),
    notes: request.notes,
  };
}

/** What the server is asked; only for a form that has been checked. */
export function requestFrom(form: PlanForm, earliestAt: number, timeZone: string): PlanRequest {
  const weeks = numberFrom(form.weeks);
  const targets = form.targetKind === 'same' ? [form.target] : form.targets.slice(0, weeks);
  return {
    name: form.name.trim(),
    firstWeekStartsAt: addWeeks(earliestAt, form.startsIn, timeZone),
    weeks,
    lookAheadWeeks: numberFrom(form.lookAheadWeeks),
    objective: 'quietest',
    heatTargetJPerWeek: targets.map((target) => joulesFromMegawattHours(numberFrom(target))),
    heatBand: numberFrom(form.bandPercent) / 100,
    notes: form.notes,
  };
}

/** Where a field of the request stands in the form. */
export function formPathOf(path: string, form: PlanForm): keyof PlanForm | `targets.${number}` | null {
  const [name, index] = path.split(/[.[\]]+/);
  switch (name) {
    case 'name':
    case 'weeks':
    case 'lookAheadWeeks':
    case 'notes':
      return name;
    case 'firstWeekStartsAt':
      return 'startsIn';
    case 'heatBand':
      return 'bandPercent';
    case 'heatTargetJPerWeek':
      if (form.targetKind === 'same') return 'target';
      return `targets.${Number(index) || 0}`;
    default:
      return null;
  }
}
