import { zodResolver } from '@hookform/resolvers/zod';
import { useRouter } from 'expo-router';
import { useForm, useWatch } from 'react-hook-form';
import { View } from 'react-native';
import type { z } from 'zod';

import { ApiError } from '../../../api/client';
import type { ReplyOf } from '../../../contract/endpoint';
import type { getPlanDefaults, PlanRequest } from '../../../contract/plans';
import { about } from '../../../lib/format';
import { useWidth } from '../../../lib/use-width';
import { Button } from '../../../ui/button';
import { SPACE } from '../../../ui/theme';
import { Words } from '../../../ui/words';
import { formFrom, formPathOf, planForm, requestFrom, type PlanForm } from '../plan-form';
import { useBuildPlan } from '../queries';
import { EnergyFields } from './energy-fields';
import { HorizonFields } from './horizon-fields';
import { NameFields } from './name-fields';
import { TargetLine } from './target-line';

interface BuildFormProps {
  fieldId: string;
  defaults: z.output<typeof getPlanDefaults.reply> & ReplyOf<typeof getPlanDefaults>;
  /** What the form starts with. */
  request: PlanRequest;
  timeZone: string;
}

export function BuildForm({ fieldId, defaults, request, timeZone }: BuildFormProps) {
  const { hasTwoPanes } = useWidth();
  const router = useRouter();
  const earliestAt = defaults.request.firstWeekStartsAt;
  const building = useBuildPlan(fieldId);
  const form = useForm<PlanForm>({
    defaultValues: formFrom(request, earliestAt, timeZone),
    resolver: zodResolver(planForm),
    mode: 'onTouched',
  });
  const { control, handleSubmit, setError } = form;
  const typed = useWatch({ control }) as PlanForm;
  const submit = handleSubmit(async (values) => {
    try {
      const { planId } = await building.mutateAsync(requestFrom(values, earliestAt, timeZone));
      router.replace({ pathname: '/fields/[fieldId]/plans/[planId]', params: { fieldId, planId } });
    } catch (error) {
      for (const { path, message } of error instanceof ApiError ? error.fields : []) {
        const place = formPathOf(path, values);
        if (place) setError(place, { message }, { shouldFocus: true });
      }
    }
  });
  const check = <TargetLine fieldId={fieldId} typed={typed} defaults={defaults} timeZone={timeZone} />;
  const parts = { control, onSubmit: () => void submit() };
  return (
    <View
      style={{ flexDirection: hasTwoPanes ? 'row' : 'column', gap: hasTwoPanes ? SPACE.six : SPACE.four }}
    >
      <View style={{ flex: hasTwoPanes ? 1 : undefined, maxWidth: 720, gap: SPACE.four }}>
        <HorizonFields {...parts} earliestAt={earliestAt} timeZone={timeZone} />
        <EnergyFields {...parts} typed={typed} earliestAt={earliestAt} timeZone={timeZone} form={form} />
        {!hasTwoPanes && check}
        <NameFields {...parts} />
      </View>
      <View style={{ width: hasTwoPanes ? 336 : '100%', gap: SPACE.two }}>
        {hasTwoPanes && check}
        {building.error && (
          <Words tone="danger" role="alert">
            {building.error.message}
          </Words>
        )}
        <Button kind="main" icon="right" onPress={parts.onSubmit} busy={building.isPending}>
          Build the plan
        </Button>
        <Words tone="quiet">{howLong(defaults.typicalSeconds)}</Words>
      </View>
    </View>
  );
}

const howLong = (typicalSeconds: number | null) =>
  typicalSeconds === null
    ? 'You can watch it being computed, leave the page, or cancel it.'
    : `It usually takes ${about(typicalSeconds)} here. You can watch it, leave the page, or cancel it.`;
