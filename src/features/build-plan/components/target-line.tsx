import { useMemo } from 'react';
import { View } from 'react-native';
import type { z } from 'zod';

import type { ReplyOf } from '../../../contract/endpoint';
import type { getPlanDefaults } from '../../../contract/plans';
import { THIN_SPACE, wholeMegawattHours } from '../../../lib/format';
import { useSettled } from '../../../lib/use-settled';
import { Icon } from '../../../ui/icon';
import { Section } from '../../../ui/layout/section';
import { SPACE, useTokens } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { planForm, requestFrom, type PlanForm } from '../plan-form';
import { useTargetCheck } from '../queries';

interface TargetLineProps {
  fieldId: string;
  typed: PlanForm;
  defaults: z.output<typeof getPlanDefaults.reply> & ReplyOf<typeof getPlanDefaults>;
  timeZone: string;
}

const SETTLED_AFTER_MS = 350;

/** Says while somebody types whether the rates can deliver it. The limits on pressure come with the plan. */
export function TargetLine({ fieldId, typed, defaults, timeZone }: TargetLineProps) {
  const tokens = useTokens();
  const earliestAt = defaults.request.firstWeekStartsAt;
  const question = JSON.stringify(questionFrom(typed, earliestAt, timeZone));
  const settled = useSettled(question, SETTLED_AFTER_MS);
  const body = useMemo(() => JSON.parse(settled) as ReturnType<typeof questionFrom>, [settled]);
  const { data, error } = useTargetCheck(fieldId, body);
  const isCurrent = settled === question && body !== null;
  const most = data?.mostHeatJ[0];
  const least = data?.leastHeatJ[0];
  const megawattHours = (joule: number) => `${wholeMegawattHours(joule)}${THIN_SPACE}MWh`;
  return (
    <Section title="Can it be met?">
      <View role="status" aria-label="Whether the target can be met" style={{ gap: SPACE.one }}>
        <View style={{ flexDirection: 'row', gap: SPACE.one, opacity: isCurrent ? 1 : 0.6, minHeight: 48 }}>
          {data && body && !error && (
            <Icon
              name={data.feasible ? 'check' : 'alert'}
              color={data.feasible ? tokens.primary : tokens.danger}
            />
          )}
          <Words
            size="lead"
            weight="medium"
            tone={data && body && !error && !data.feasible ? 'danger' : 'ink'}
            style={{ flexShrink: 1 }}
          >
            {error
              ? error.message
              : body === null
                ? 'Fill in weeks and energy to see whether it can be met.'
                : (data?.sentence ?? 'Checking …')}
          </Words>
        </View>
        <Words tone="quiet">
          Last week’s rates deliver {megawattHours(defaults.lastWeekHeatJ)}.
          {least !== undefined && most !== undefined && body
            ? ` Week 1 can deliver ${wholeMegawattHours(least)} to ${megawattHours(most)}.`
            : ''}{' '}
          Checked against rates, ramps, outages and balance; pressures are checked when the plan is computed.
        </Words>
      </View>
    </Section>
  );
}

/** Nothing to ask while the form cannot be read. */
function questionFrom(typed: PlanForm, earliestAt: number, timeZone: string) {
  // Name and notes have no part in it.
  const parsed = planForm.safeParse({ ...typed, name: 'x', notes: '' });
  if (!parsed.success) return null;
  const { firstWeekStartsAt, weeks, heatTargetJPerWeek, heatBand } = requestFrom(
    parsed.data,
    earliestAt,
    timeZone,
  );
  return { firstWeekStartsAt, weeks, heatTargetJPerWeek, heatBand };
}
