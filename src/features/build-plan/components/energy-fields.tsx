import { Controller, type UseFormReturn } from 'react-hook-form';
import { View } from 'react-native';

import { weekName } from '../../../lib/format';
import { addWeeks } from '../../../lib/weeks';
import { Button } from '../../../ui/button';
import { Choice } from '../../../ui/form/choice';
import { Section } from '../../../ui/layout/section';
import { SPACE } from '../../../ui/theme';
import { MOST_WEEKS, numberFrom, type PlanForm } from '../plan-form';
import { FormField } from './form-field';
import { type FormPart } from './form-parts';

interface EnergyFieldsProps extends FormPart {
  typed: PlanForm;
  earliestAt: number;
  timeZone: string;
  form: UseFormReturn<PlanForm>;
}

export function EnergyFields({ control, onSubmit, typed, earliestAt, timeZone, form }: EnergyFieldsProps) {
  const chosen = numberFrom(typed.weeks);
  const weeks = Number.isInteger(chosen) ? Math.max(0, Math.min(MOST_WEEKS, chosen)) : 0;
  const fillDown = () =>
    form.setValue(
      'targets',
      typed.targets.map(() => typed.targets[0] ?? ''),
      { shouldValidate: true },
    );
  return (
    <Section title="Energy target" intro="Heat at the wellheads, from the targets calendar where it has any.">
      <Controller
        control={control}
        name="targetKind"
        render={({ field: { value, onChange } }) => (
          <Choice
            label="Energy target"
            value={value}
            onChange={onChange}
            options={[
              { value: 'same', name: 'Same every week' },
              { value: 'perWeek', name: 'One per week' },
            ]}
          />
        )}
      />
      {typed.targetKind === 'same' ? (
        <FormField
          control={control}
          name="target"
          label="Energy per week"
          unit="MWh"
          kind="number"
          onSubmit={onSubmit}
        />
      ) : (
        <View style={{ gap: SPACE.one }}>
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.one }}>
            {Array.from({ length: weeks }, (_, week) => (
              <View key={week} style={{ flexGrow: 1, flexShrink: 1, flexBasis: 136, maxWidth: 220 }}>
                <FormField
                  control={control}
                  name={`targets.${week}`}
                  label={weekName(addWeeks(earliestAt, typed.startsIn + week, timeZone), timeZone)}
                  unit="MWh"
                  kind="number"
                  onSubmit={onSubmit}
                />
              </View>
            ))}
            {/* Keep the last row's fields as wide as the others. */}
            {[0, 1, 2, 3].map((spare) => (
              <View
                key={`spare-${spare}`}
                style={{ flexGrow: 1, flexShrink: 1, flexBasis: 136, maxWidth: 220 }}
              />
            ))}
          </View>
          <View style={{ alignItems: 'flex-start' }}>
            <Button kind="quiet" icon="down" onPress={fillDown}>
              Fill all weeks from the first
            </Button>
          </View>
        </View>
      )}
      <FormField
        control={control}
        name="bandPercent"
        label="Allowed over-delivery"
        unit="%"
        kind="number"
        hint="How much above its target a week may deliver."
        onSubmit={onSubmit}
      />
    </Section>
  );
}
