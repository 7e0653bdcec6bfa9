import { Pressable, View } from 'react-native';

import { Icon } from '../icon';
import { CORNER, SPACE, useTokens } from '../theme';
import { Words } from '../words';

interface StepperProps {
  label: string;
  /** What is chosen, in words. */
  text: string;
  value: number;
  least: number;
  most: number;
  onChange: (value: number) => void;
  error?: string;
}

const HEIGHT = 50;
/** A text field keeps this much free for the label on its outline. */
const LABEL_ROOM = 6;

/** One of a row of choices, a step at a time: arrow keys, or the two ends. */
export function Stepper({ label, text, value, least, most, onChange, error }: StepperProps) {
  const tokens = useTokens();
  const step = (by: number) => onChange(Math.max(least, Math.min(most, value + by)));
  const keys: Record<string, number> = { ArrowUp: 1, ArrowRight: 1, ArrowDown: -1, ArrowLeft: -1 };
  const onKeyDown = (event: { key: string; preventDefault(): void }) => {
    const by = keys[event.key];
    if (by === undefined) return;
    event.preventDefault();
    step(by);
  };
  return (
    <View style={{ gap: SPACE.half }}>
      <View
        style={{
          flexDirection: 'row',
          alignItems: 'center',
          height: HEIGHT,
          marginTop: LABEL_ROOM,
          borderWidth: 1,
          borderColor: error ? tokens.danger : tokens.outline,
          borderRadius: CORNER,
          backgroundColor: tokens.surface,
        }}
      >
        <End icon="left" label={`${label}: earlier`} onPress={() => step(-1)} isOff={value <= least} />
        <View
          {...({ onKeyDown } as object)}
          role="spinbutton"
          tabIndex={0}
          aria-label={label}
          aria-valuemin={least}
          aria-valuemax={most}
          aria-valuenow={value}
          aria-valuetext={text}
          style={{ flexGrow: 1, flexShrink: 1, alignItems: 'center' }}
        >
          <Words size="small" tone="quiet">
            {label}
          </Words>
          <Words size="lead" tabular lines={1}>
            {text}
          </Words>
        </View>
        <End icon="right" label={`${label}: later`} onPress={() => step(1)} isOff={value >= most} />
      </View>
      {error && (
        <Words size="small" tone="danger" role="alert">
          {error}
        </Words>
      )}
    </View>
  );
}

function End(props: { icon: 'left' | 'right'; label: string; onPress: () => void; isOff: boolean }) {
  const tokens = useTokens();
  return (
    <Pressable
      role="button"
      aria-label={props.label}
      disabled={props.isOff}
      onPress={props.onPress}
      style={{ width: 48, height: HEIGHT - 2, alignItems: 'center', justifyContent: 'center' }}
    >
      <Icon name={props.icon} color={props.isOff ? tokens.hairline : tokens.primary} />
    </Pressable>
  );
}
