import { useMemo } from 'react';
import { useColorScheme } from 'react-native';
import { MD3DarkTheme, MD3LightTheme, configureFonts, type MD3Theme } from 'react-native-paper';

/** Colours by what they mean; light and dark pairs are checked for contrast in tests/src/ui/theme.test.ts. */
export interface Palette {
  /** The page. */
  paper: string;
  /** What lies on the page: sheets, bars, fields. */
  surface: string;
  ink: string;
  quietInk: string;
  /** Hairlines and axis rules; decoration only. */
  rule: string;
  /** Primary; injection, cool. */
  water: string;
  onWater: string;
  /** Heat, production, energy. */
  ember: string;
  /** Seismicity above background. */
  plum: string;
  /** A soft ground for the selected and the hovered. */
  wash: string;
}

export const LIGHT: Palette = {
  paper: '#F7F4EC',
  surface: '#FFFFFF',
  ink: '#16232B',
  quietInk: '#52626C',
  rule: '#D9D3C5',
  water: '#0B5563',
  onWater: '#FFFFFF',
  ember: '#A8441A',
  plum: '#7A2E6B',
  wash: '#ECE7DA',
};

export const DARK: Palette = {
  paper: '#12191D',
  surface: '#1A2328',
  ink: '#E9E4D8',
  quietInk: '#9FB0B8',
  rule: '#34424A',
  water: '#6FC3D2',
  onWater: '#0B1C21',
  ember: '#F0945F',
  plum: '#D78CC6',
  wash: '#222E34',
};

/** Steps of the 4-point grid. */
export const SPACE = { xs: 4, s: 8, m: 12, l: 16, xl: 24, xxl: 32, xxxl: 48 } as const;
export const TYPE = { 12: 12, 14: 14, 16: 16, 20: 20, 28: 28, 44: 44 } as const;
export const RADIUS = 10;
export const TOUCH = 48;
export const CONTENT_WIDTH = 1280;

/** Widths at which the layout changes. */
export const BREAK = { margin: 600, rail: 840, panes: 1100 } as const;

export const FONT = {
  regular: 'Roboto_400Regular',
  medium: 'Roboto_500Medium',
  bold: 'Roboto_700Bold',
} as const;

export interface AppTheme extends MD3Theme {
  palette: Palette;
}

/** Palette of the system's light or dark mode. */
export function usePalette(): Palette {
  return useColorScheme() === 'dark' ? DARK : LIGHT;
}

/** The same for the component library. */
export function useAppTheme(): AppTheme {
  const isDark = useColorScheme() === 'dark';
  return useMemo(() => paperTheme(isDark), [isDark]);
}

export function paperTheme(isDark: boolean): AppTheme {
  const palette = isDark ? DARK : LIGHT;
  const base = isDark ? MD3DarkTheme : MD3LightTheme;
  const fonts = configureFonts({ config: { fontFamily: FONT.regular } });
  return {
    ...base,
    palette,
    roundness: RADIUS / 4,
    fonts: { ...fonts, default: { ...fonts.default, fontFamily: FONT.regular } },
    colors: {
      ...base.colors,
      primary: palette.water,
      onPrimary: palette.onWater,
      primaryContainer: palette.wash,
      onPrimaryContainer: palette.ink,
      secondary: palette.ember,
      secondaryContainer: palette.wash,
      onSecondaryContainer: palette.ink,
      tertiary: palette.plum,
      background: palette.paper,
      onBackground: palette.ink,
      surface: palette.surface,
      onSurface: palette.ink,
      surfaceVariant: palette.wash,
      onSurfaceVariant: palette.quietInk,
      outline: palette.quietInk,
      outlineVariant: palette.rule,
      error: palette.plum,
      elevation: {
        ...base.colors.elevation,
        level0: 'transparent',
        level1: palette.surface,
        level2: palette.surface,
        level3: palette.surface,
      },
    },
  };
}
