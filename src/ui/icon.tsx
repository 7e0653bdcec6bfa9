import Svg, { Path } from 'react-native-svg';
import { View } from 'react-native';

import { useTokens } from './theme';

/** Drawn for this product on a 24 grid, one stroke weight, no fills. */
const PATHS = {
  week: 'M4 6.5h16v13H4zM4 10.5h16M8.5 3.5v4M15.5 3.5v4M8 14.5h3',
  plans: 'M4 18.5h16M4 5v13.5M7 14.5h4v-4h4v-3h4',
  more: 'M5 12h.01M12 12h.01M19 12h.01',
  fields: 'M4 8.5l8-4 8 4-8 4zM4 12.5l8 4 8-4M4 16.5l8 4 8-4',
  down: 'M6 9.5l6 6 6-6',
  up: 'M6 14.5l6-6 6 6',
  right: 'M9.5 6l6 6-6 6',
  left: 'M14.5 6l-6 6 6 6',
  plus: 'M12 5v14M5 12h14',
  minus: 'M5 12h14',
  close: 'M6 6l12 12M18 6L6 18',
  check: 'M5 12.5l4.5 4.5L19 7.5',
  alert: 'M12 4.5l8.5 15h-17zM12 10v4M12 16.8v.01',
  stop: 'M7 7h10v10H7z',
  pause: 'M9 6v12M15 6v12',
  clock: 'M12 4a8 8 0 1 0 0 16 8 8 0 0 0 0-16M12 8v4.5l3 2',
  download: 'M12 4v11M7.5 11l4.5 4.5 4.5-4.5M5 19.5h14',
  table: 'M4 5.5h16v13H4zM4 10h16M4 14.2h16M10 5.5v13',
  chart: 'M4 5v14h16M7.5 14.5l3.5-4 3 2.5 4.5-6',
  again: 'M19 12a7 7 0 1 1-2.2-5.1M19.5 4v4h-4',
  signOut: 'M10 5H5v14h5M14 8l4 4-4 4M9.5 12H18',
  person: 'M12 4.5a3.5 3.5 0 1 0 0 7 3.5 3.5 0 0 0 0-7M5 19.5c.6-3.4 3.4-5 7-5s6.4 1.6 7 5',
  eye: 'M3 12c2.2-4 5.3-6 9-6s6.8 2 9 6c-2.2 4-5.3 6-9 6s-6.8-2-9-6M12 9.5a2.5 2.5 0 1 0 0 5 2.5 2.5 0 0 0 0-5',
  eyeOff:
    'M4 4l16 16M9 6.5c1-.3 2-.5 3-.5 3.700 0 6.800 2 9 6-.8 1.400-1.700 2.500-2.700 3.400M6 8.200C4.900 9.200 3.900 10.400 3 12c2.200 4 5.300 6 9 6 1.700 0 3.200-.4 4.600-1.200',
} as const;

export type IconName = keyof typeof PATHS;

export const isIconName = (name: unknown): name is IconName => typeof name === 'string' && name in PATHS;

/** Always beside a word, or inside something that has a label; so it says nothing by itself. */
export function Icon({ name, size = 24, color }: { name: IconName; size?: number; color?: string }) {
  const tokens = useTokens();
  return (
    <View aria-hidden style={{ width: size, height: size }}>
      <Svg width={size} height={size} viewBox="0 0 24 24" fill="none">
        <Path
          d={PATHS[name]}
          stroke={color ?? tokens.ink}
          strokeWidth={name === 'more' ? 2.6 : 1.75}
          strokeLinecap="round"
          strokeLinejoin="round"
        />
      </Svg>
    </View>
  );
}
