import { MD3DarkTheme, MD3LightTheme, useTheme, type MD3Theme } from 'react-native-paper';

import { FONT } from './fonts';

/** Warm paper, ink and three accents. Every text pair is at least 4.5:1 (tests/src/ui/theme.test.ts). */
export interface Tokens {
  paper: string;
  surface: string;
  ink: string;
  quiet: string;
  /** Rules between things; never the only sign of anything. */
  hairline: string;
  /** Outline of what can be typed into or pressed: 3:1 against paper. */
  outline: string;
  /** Behind what is chosen. */
  wash: string;
  /** Deep water: injection, cool, what to press. */
  primary: string;
  onPrimary: string;
  /** Heat, production, energy. */
  ember: string;
  /** Seismicity above background. */
  plum: string;
  danger: string;
  onDanger: string;
}

export const LIGHT: Tokens = {
  paper: '#F7F4EC',
  surface: '#FFFFFF',
  ink: '#16232B',
  quiet: '#52626C',
  hairline: '#DED8C9',
  outline: '#7C8891',
  wash: '#E6EBE6',
  primary: '#0B5563',
  onPrimary: '#FFFFFF',
  ember: '#A8441A',
  plum: '#7A2E6B',
  danger: '#9A2420',
  onDanger: '#FFFFFF',
};

export const DARK: Tokens = {
  paper: '#12191D',
  surface: '#1A2328',
  ink: '#E9E4D8',
  quiet: '#9FB0B8',
  hairline: '#2C383E',
  outline: '#75868F',
  wash: '#20303A',
  primary: '#6FC3D2',
  onPrimary: '#0A2329',
  ember: '#F0945F',
  plum: '#D78CC6',
  danger: '#F2A098',
  onDanger: '#3A0E0B',
};

/** Multiples of four; nothing else is used for distance. */
export const SPACE = { half: 4, one: 8, small: 12, two: 16, three: 24, four: 32, six: 48 } as const;
export const CORNER = 10;
export const TOUCH_TARGET = 48;
export const CONTENT_MAX_WIDTH = 1280;

export interface AppTheme extends MD3Theme {
  tokens: Tokens;
}

export const lightTheme = makeTheme(MD3LightTheme, LIGHT);
export const darkTheme = makeTheme(MD3DarkTheme, DARK);

export const useTokens = (): Tokens => useTheme<AppTheme>().tokens;

function makeTheme(base: MD3Theme, tokens: Tokens): AppTheme {
  const { paper, surface, ink, quiet, hairline, outline, wash, primary, onPrimary, ember, plum } = tokens;
  return {
    ...base,
    tokens,
    roundness: CORNER / 4,
    fonts: fontsOf(base),
    colors: {
      ...base.colors,
      primary,
      onPrimary,
      primaryContainer: wash,
      onPrimaryContainer: ink,
      secondary: ember,
      onSecondary: onPrimary,
      secondaryContainer: wash,
      onSecondaryContainer: ink,
      tertiary: plum,
      onTertiary: onPrimary,
      tertiaryContainer: wash,
      onTertiaryContainer: ink,
      background: paper,
      onBackground: ink,
      surface,
      onSurface: ink,
      surfaceVariant: wash,
      onSurfaceVariant: quiet,
      outline,
      outlineVariant: hairline,
      error: tokens.danger,
      onError: tokens.onDanger,
      errorContainer: wash,
      onErrorContainer: tokens.danger,
      inverseSurface: ink,
      inverseOnSurface: paper,
      inversePrimary: primary,
      elevation: {
        ...base.colors.elevation,
        level1: surface,
        level2: surface,
        level3: surface,
        level4: surface,
        level5: surface,
      },
    },
  };
}

/** Each weight is a family of its own, so that no browser invents a bold. */
function fontsOf(base: MD3Theme): MD3Theme['fonts'] {
  const variants = Object.entries(base.fonts).map(([name, variant]) => {
    const isMedium = 'fontWeight' in variant && variant.fontWeight === '500';
    return [name, { ...variant, fontFamily: isMedium ? FONT.medium : FONT.regular, fontWeight: '400' }];
  });
  return Object.fromEntries(variants) as MD3Theme['fonts'];
}
