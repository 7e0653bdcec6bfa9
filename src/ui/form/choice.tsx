import { Pressable, View } from 'react-native';

import { CORNER, SPACE, TOUCH_TARGET, useTokens } from '../theme';
import { Words } from '../words';

interface ChoiceProps<Value extends string> {
  label: string;
  value: Value;
  options: { value: Value; name: string }[];
  onChange: (value: Value) => void;
}

/** One of a few, all of them in sight. */
export function Choice<Value extends string>({ label, value, options, onChange }: ChoiceProps<Value>) {
  const tokens = useTokens();
  return (
    <View
      role="radiogroup"
      aria-label={label}
      style={{ flexDirection: 'row', flexWrap: 'wrap', gap: SPACE.one }}
    >
      {options.map((option) => {
        const isChosen = option.value === value;
        return (
          <Pressable
            key={option.value}
            role="radio"
            aria-checked={isChosen}
            onPress={() => onChange(option.value)}
            style={{
              minHeight: TOUCH_TARGET,
              minWidth: TOUCH_TARGET,
              justifyContent: 'center',
              alignItems: 'center',
              paddingHorizontal: SPACE.two,
              borderRadius: CORNER,
              borderWidth: isChosen ? 2 : 1,
              borderColor: isChosen ? tokens.primary : tokens.outline,
              backgroundColor: isChosen ? tokens.wash : 'transparent',
            }}
          >
            <Words weight={isChosen ? 'bold' : 'regular'} tone={isChosen ? 'primary' : 'ink'}>
              {option.name}
            </Words>
          </Pressable>
        );
      })}
    </View>
  );
}
