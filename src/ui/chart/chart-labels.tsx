import { View } from 'react-native';

import { Words } from '../words';
import { endOf, middleOf, type Series } from './series';
import { type Frame } from './week-plot';

const LINE_HEIGHT = 16;

/** Names at the ends of the lines instead of a legend, pushed apart where they would touch. */
export function ChartLabels({
  series,
  frame,
  todayAt,
}: {
  series: Series[];
  frame: Frame;
  todayAt?: number;
}) {
  const ends = spread(
    series.flatMap((entry) => {
      if (!entry.label) return [];
      const { x, y } = endPoint(entry, frame);
      return [{ text: entry.label, color: entry.color, x, y }];
    }),
    frame,
  );
  return (
    <View aria-hidden pointerEvents="none" style={{ position: 'absolute', inset: 0 }}>
      {ends.map(({ text, color, x, y }) => (
        <Words
          key={text}
          size="small"
          weight="medium"
          lines={1}
          style={{
            position: 'absolute',
            left: x + 6,
            top: y - LINE_HEIGHT / 2,
            color,
            maxWidth: frame.width - x - 6,
          }}
        >
          {text}
        </Words>
      ))}
      {todayAt !== undefined && (
        <Words
          size="small"
          tone="quiet"
          style={{ position: 'absolute', left: frame.x(todayAt) + 4, top: frame.padding.top - 12 }}
        >
          today
        </Words>
      )}
    </View>
  );
}

function endPoint(entry: Series, frame: Frame): { x: number; y: number } {
  const right = frame.width - frame.padding.right;
  if (entry.kind === 'level') return { x: right, y: frame.y(entry.value) };
  const last = entry.points.at(-1);
  if (!last) return { x: right, y: frame.y(0) };
  const value = 'value' in last ? last.value : (last.low + last.high) / 2;
  const isStepped = 'shape' in entry && entry.shape === 'steps';
  const x = isStepped ? endOf(last.at) : middleOf(last.at);
  return { x: Math.min(right, frame.x(x)), y: frame.y(value) };
}

/** From the top down, each at least a line below the one before; then up again where the last fell off. */
function spread<Label extends { y: number; x: number; text: string }>(
  labels: Label[],
  frame: Frame,
): Label[] {
  const sorted = [...labels].sort((a, b) => a.y - b.y).map((label) => ({ ...label }));
  for (let index = 1; index < sorted.length; index++) {
    const above = sorted[index - 1]!;
    const label = sorted[index]!;
    label.y = Math.max(label.y, above.y + LINE_HEIGHT);
  }
  const bottom = frame.height - frame.padding.bottom;
  for (let index = sorted.length - 1; index >= 0; index--) {
    const label = sorted[index]!;
    const limit = index === sorted.length - 1 ? bottom : sorted[index + 1]!.y - LINE_HEIGHT;
    label.y = Math.min(label.y, limit);
  }
  return sorted;
}
