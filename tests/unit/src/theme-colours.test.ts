import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { chartColourTable } from '../../../src/app/ui/chart-colours';

const source = readFileSync(new URL('../../../src/theme/_colours.scss', import.meta.url), 'utf8');

const colour = String.raw`(#[0-9a-f]{6}|rgba\([^)]+\))`;
const line = new RegExp(String.raw`'([a-z-]+)': \(\s*${colour},\s*${colour},?\s*\)`, 'g');

/** Token to its day and night colour, as the style sheet has them. */
const tokens = new Map(
  [...source.matchAll(line)].map(([, name, day, night]) => [name!, { day: day!, night: night! }]),
);

/** WCAG 2.2, definitions of "relative luminance" and "contrast ratio". */
function luminance(hex: string): number {
  const [red, green, blue] = [1, 3, 5].map((at) => {
    const channel = parseInt(hex.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * red! + 0.7152 * green! + 0.0722 * blue!;
}

function contrast(a: string, b: string): number {
  const [darker, lighter] = [luminance(a), luminance(b)].sort((x, y) => x - y);
  return (lighter! + 0.05) / (darker! + 0.05);
}

const themes = ['day', 'night'] as const;
const grounds = ['ground', 'sheet', 'raised'];
const texts = ['ink', 'soft', 'inferred', 'laboratory', 'limit', 'attention', 'urgent'];

describe('the colours of the theme', () => {
  it('knows the contrast of black on white, 21, and of grey 777777 on white, 4.48 (WCAG’s own example, from memory)', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 9);
    expect(contrast('#777777', '#ffffff')).toBeCloseTo(4.48, 2);
  });

  it.each(
    themes.flatMap((theme) => texts.flatMap((text) => grounds.map((ground) => ({ theme, text, ground })))),
  )('lets $text be read on $ground by $theme: at least 4.5:1', ({ theme, text, ground }) => {
    expect(contrast(tokens.get(text)![theme], tokens.get(ground)![theme])).toBeGreaterThanOrEqual(4.5);
  });

  it.each(themes.flatMap((theme) => grounds.map((ground) => ({ theme, ground }))))(
    'lets the edge of a field be seen on $ground by $theme: at least 3:1',
    ({ theme, ground }) => {
      expect(contrast(tokens.get('edge')![theme], tokens.get(ground)![theme])).toBeGreaterThanOrEqual(3);
    },
  );

  it.each(
    themes.flatMap((theme) => [
      { theme, text: 'on-inferred', ground: 'inferred' },
      { theme, text: 'urgent', ground: 'urgent-ground' },
    ]),
  )('lets $text be read on $ground by $theme', ({ theme, text, ground }) => {
    expect(contrast(tokens.get(text)![theme], tokens.get(ground)![theme])).toBeGreaterThanOrEqual(4.5);
  });

  it.each(themes)('gives charts the same colours by %s', (theme) => {
    for (const [name, colour] of Object.entries(chartColourTable[theme]))
      expect([name, colour]).toEqual([name, tokens.get(name)?.[theme]]);
  });
});
