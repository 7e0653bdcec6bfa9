import { useState } from 'react';
import { View } from 'react-native';

import { type Frame } from './week-plot';

interface ReadOutProps {
  label: string;
  positions: number[];
  index: number;
  onChange: (index: number) => void;
  text: string;
  frame: Frame;
  color: string;
}

const STEPS: Record<string, number> = { ArrowLeft: -1, ArrowDown: -1, ArrowRight: 1, ArrowUp: 1 };

/** A hair that follows finger, mouse and arrow keys, and says aloud where it stands. */
export function ReadOut({ label, positions, index, onChange, text, frame, color }: ReadOutProps) {
  const [isActive, setIsActive] = useState(false);
  const last = positions.length - 1;
  const goTo = (x: number) => onChange(nearest(positions, x));
  const onKeyDown = (event: { key: string; preventDefault(): void }) => {
    const step = STEPS[event.key];
    const target =
      event.key === 'Home' ? 0 : event.key === 'End' ? last : step === undefined ? null : index + step;
    if (target === null) return;
    event.preventDefault();
    onChange(Math.max(0, Math.min(last, target)));
  };
  // The web has these; the types of the native view do not.
  const webOnly = { onKeyDown, 'aria-orientation': 'horizontal' } as object;
  return (
    <View
      {...webOnly}
      role="slider"
      tabIndex={0}
      aria-label={`${label}, week by week`}
      aria-valuemin={0}
      aria-valuemax={last}
      aria-valuenow={index}
      aria-valuetext={text}
      onPointerMove={({ nativeEvent }) => goTo(nativeEvent.offsetX)}
      onPointerDown={({ nativeEvent }) => goTo(nativeEvent.offsetX)}
      onPointerEnter={() => setIsActive(true)}
      onPointerLeave={() => setIsActive(false)}
      onFocus={() => setIsActive(true)}
      onBlur={() => setIsActive(false)}
      style={[{ position: 'absolute', inset: 0 }, { touchAction: 'pan-y', cursor: 'crosshair' } as object]}
    >
      <View
        pointerEvents="none"
        style={{
          position: 'absolute',
          left: (positions[index] ?? 0) - 0.5,
          top: frame.padding.top,
          bottom: frame.padding.bottom,
          width: 1,
          backgroundColor: color,
          opacity: isActive ? 1 : 0,
        }}
      />
    </View>
  );
}

function nearest(positions: number[], x: number): number {
  let best = 0;
  positions.forEach((position, index) => {
    if (Math.abs(position - x) < Math.abs((positions[best] ?? 0) - x)) best = index;
  });
  return best;
}
