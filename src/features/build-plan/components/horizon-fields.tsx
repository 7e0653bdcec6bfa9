import { Controller } from 'react-hook-form';
import { View } from 'react-native';

import { weekdayName } from '../../../lib/format';
import { addWeeks } from '../../../lib/weeks';
import { Stepper } from '../../../ui/form/stepper';
import { Section } from '../../../ui/layout/section';
import { SPACE } from '../../../ui/theme';
import { MOST_WEEKS_AHEAD } from '../plan-form';
import { FormField } from './form-field';
import { type FormPart } from './form-parts';

interface HorizonFieldsProps extends FormPart {
  earliestAt: number;
  timeZone: string;
}

export function HorizonFields({ control, onSubmit, earliestAt, timeZone }: HorizonFieldsProps) {
  return (
    <Section title="Weeks">
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.two }}>
        <View style={{ flexGrow: 1.3, flexShrink: 1, flexBasis: 260 }}>
          <Controller
            control={control}
            name="startsIn"
            render={({ field: { value, onChange }, fieldState }) => (
              <Stepper
                label="First week"
                value={value}
                text={weekdayName(addWeeks(earliestAt, value, timeZone), timeZone)}
                least={0}
                most={MOST_WEEKS_AHEAD}
                onChange={onChange}
                error={fieldState.error?.message}
              />
            )}
          />
        </View>
        <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 160 }}>
          <FormField
            control={control}
            name="weeks"
            label="Weeks to plan"
            unit="weeks"
            kind="number"
            hint="1 to 26, each with its own set-points."
            onSubmit={onSubmit}
          />
        </View>
        <View style={{ flexGrow: 1, flexShrink: 1, flexBasis: 160 }}>
          <FormField
            control={control}
            name="lookAheadWeeks"
            label="Look-ahead"
            unit="weeks"
            kind="number"
            hint="Weeks after it whose earthquakes count too."
            onSubmit={onSubmit}
          />
        </View>
      </View>
    </Section>
  );
}
