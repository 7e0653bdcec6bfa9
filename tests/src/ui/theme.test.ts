import { describe, expect, it } from 'vitest';

import { DARK, LIGHT, type Tokens } from '../../../src/ui/theme';

/** Relative luminance and contrast: W3C, WCAG 2.2, definitions "relative luminance" and "contrast ratio". */
function luminance(hex: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const channel = parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function contrast(one: string, other: string): number {
  const [low, high] = [luminance(one), luminance(other)].sort((a, b) => a - b) as [number, number];
  return (high + 0.05) / (low + 0.05);
}

const ON = ['paper', 'surface', 'wash'] as const;
const TEXT = ['ink', 'quiet', 'primary', 'ember', 'plum', 'danger'] as const;

describe.each<[string, Tokens]>([
  ['light', LIGHT],
  ['dark', DARK],
])('%s theme', (_name, tokens) => {
  it('knows black on white', () => expect(contrast('#000000', '#FFFFFF')).toBeCloseTo(21, 5));

  it.each(ON.flatMap((ground) => TEXT.map((text) => [text, ground] as const)))(
    '%s can be read on %s',
    (text, ground) => expect(contrast(tokens[text], tokens[ground])).toBeGreaterThanOrEqual(4.5),
  );

  it('can be read on what is pressed', () => {
    expect(contrast(tokens.onPrimary, tokens.primary)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(tokens.onDanger, tokens.danger)).toBeGreaterThanOrEqual(4.5);
  });

  it('outlines what can be typed into at 3:1', () => {
    for (const ground of ['paper', 'surface'] as const) {
      expect(contrast(tokens.outline, tokens[ground])).toBeGreaterThanOrEqual(3);
    }
  });
});
