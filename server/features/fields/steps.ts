import type { FieldWeek } from '../../../src/contract/fields';
import { dayInWords } from '../../time/local-week';

type Step = FieldWeek['steps'][number];

export interface LoopFacts {
  timeZone: string;
  weekStartsAt: number;
  nextWeekStartsAt: number;
  lastCompleteWeekAt: number;
  newestReadingAt: number | null;
  model: { number: number } | null;
  /** A plan that has been computed, is not withdrawn and covers the coming week. */
  plan: { number: number } | null;
  jobOpen: boolean;
}

const NOT_PART = 'Not part of this version.';

/** Where the weekly loop stands. Steps that this version cannot do say so. */
export function loopSteps(facts: LoopFacts): Step[] {
  const readings = readingsStep(facts);
  return [
    readings,
    modelCheckStep(facts),
    notUsed('refit', 'fieldEngineer'),
    buildStep(facts, readings.state === 'done'),
    notUsed('review', 'productionLead'),
    notUsed('issue', 'fieldEngineer'),
    notUsed('follow', 'hseOfficer'),
    notUsed('report', 'hseOfficer'),
  ];
}

const notUsed = (step: Step['step'], who: Step['who']): Step => ({
  step,
  who,
  state: 'notUsed',
  sentence: NOT_PART,
});

function readingsStep(facts: LoopFacts): Step {
  const who = 'fieldEngineer';
  const { newestReadingAt } = facts;
  if (newestReadingAt === null) {
    return { step: 'readings', who, state: 'now', sentence: 'No rates have been metered yet.' };
  }
  const week = `the week of ${dayInWords(newestReadingAt, facts.timeZone)}`;
  return newestReadingAt >= facts.lastCompleteWeekAt
    ? { step: 'readings', who, state: 'done', sentence: `Rates are complete up to ${week}.` }
    : { step: 'readings', who, state: 'now', sentence: `Rates stop at ${week}: newer ones are missing.` };
}

function modelCheckStep({ model }: LoopFacts): Step {
  const sentence = model
    ? `Holding last week's forecast against the catalogue is not part of this version; plans use the accepted model ${model.number}.`
    : 'No model of the ground has been accepted.';
  return { step: 'modelCheck', who: 'fieldEngineer', state: 'notUsed', sentence };
}

function buildStep(facts: LoopFacts, readingsDone: boolean): Step {
  const step = { step: 'build', who: 'fieldEngineer' } as const;
  const week = dayInWords(facts.nextWeekStartsAt, facts.timeZone);
  if (facts.jobOpen) return { ...step, state: 'now', sentence: 'A plan is being computed.' };
  if (facts.plan) {
    return { ...step, state: 'done', sentence: `Plan ${facts.plan.number} covers the week of ${week}.` };
  }
  if (!facts.model) return { ...step, state: 'next', sentence: 'A plan needs an accepted model.' };
  // Missing readings make a plan worse, not impossible: the last metered rates are taken to hold.
  return {
    ...step,
    state: readingsDone ? 'now' : 'next',
    sentence: `No plan covers the week of ${week} yet.`,
  };
}
