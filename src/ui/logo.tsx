import { View } from 'react-native';
import Svg, { Path } from 'react-native-svg';

import { SPACE, useTokens } from './theme';
import { Words } from './words';

const WIDTH = 64;
const MIDDLE = 16;

/** The still line: flat, one ripple that dies out, flat again. */
export const STILL_LINE = stillLine();

function stillLine(): string {
  const startsAt = 10;
  const points = [`M2 ${MIDDLE}`, `L${startsAt} ${MIDDLE}`];
  for (let x = 0; x <= 44; x += 0.5) {
    // Lifts off softly and is all but still before the line ends.
    const rise = 17 * (1 - Math.exp(-((x / 2.2) ** 2))) * Math.exp(-x / 9) * Math.sin(x / 2.9);
    points.push(`L${startsAt + x} ${(MIDDLE - rise).toFixed(2)}`);
  }
  points.push(`L${WIDTH - 2} ${MIDDLE}`);
  return points.join(' ');
}

export function LogoMark({ height = 24, color }: { height?: number; color?: string }) {
  const tokens = useTokens();
  return (
    <View aria-hidden>
      <Svg width={height * 2} height={height} viewBox={`0 0 ${WIDTH} 32`} fill="none">
        <Path
          d={STILL_LINE}
          stroke={color ?? tokens.primary}
          strokeWidth={3}
          strokeLinecap="round"
          strokeLinejoin="round"
        />
      </Svg>
    </View>
  );
}

export function Logo({ large = false }: { large?: boolean }) {
  return (
    <View style={{ flexDirection: 'row', alignItems: 'center', gap: SPACE.small }}>
      <LogoMark height={large ? 36 : 24} />
      <Words size={large ? 'head' : 'title'} weight="medium">
        Stillfield
      </Words>
    </View>
  );
}
