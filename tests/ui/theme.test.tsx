import { readFileSync } from 'node:fs';

import { act, render, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';

import { chooseTheme, useTheme } from '@/components/theme/theme';
import { palettes, type ColorName, type Scheme } from '@/components/theme/tokens';
import { setDark } from '../support/ui-setup';

/** Relative luminance and contrast ratio: Web Content Accessibility Guidelines 2.2, W3C 2023, definitions (from memory). */
function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const part = parseInt(hex.slice(at, at + 2), 16) / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}
function contrast(one: string, other: string): number {
  const [high = 0, low = 0] = [luminance(one), luminance(other)].sort((a, b) => b - a);
  return (high + 0.05) / (low + 0.05);
}

describe.each(Object.keys(palettes) as Scheme[])('%s', (scheme) => {
  const colors = palettes[scheme];
  const grounds: ColorName[] = ['page', 'raised'];
  const words: ColorName[] = ['ink', 'quiet', 'stop', 'warn', 'good', 'note'];

  it.each(grounds.flatMap((ground) => words.map((word) => [word, ground] as const)))(
    '%s on %s reads at 7:1',
    (word, ground) => {
      expect(contrast(colors[word], colors[ground])).toBeGreaterThanOrEqual(7);
    },
  );

  it('reads on hi-vis, on a disabled button, and sees the edge of a control and the focus', () => {
    expect(contrast(colors.onVis, colors.vis)).toBeGreaterThanOrEqual(7);
    expect(contrast(colors.quiet, colors.sunk)).toBeGreaterThanOrEqual(4.5);
    for (const ground of grounds) {
      expect(contrast(colors.edge, colors[ground])).toBeGreaterThanOrEqual(3);
      expect(contrast(colors.focus, colors[ground])).toBeGreaterThanOrEqual(3);
    }
  });
});

describe('the page before any script', () => {
  const css = readFileSync('public/app.css', 'utf8');
  const block = (start: string) => {
    const from = css.indexOf(start);
    const pairs = css.slice(from, css.indexOf('}', from)).matchAll(/--(\w+): (#\w+);/g);
    return Object.fromEntries([...pairs].map((pair) => [pair[1], pair[2]]));
  };
  const lower = (scheme: Scheme) =>
    Object.fromEntries(Object.entries(palettes[scheme]).map(([name, hex]) => [name, hex.toLowerCase()]));

  it('has the same colours, by system and by choice', () => {
    expect(block(':root {')).toEqual(lower('light'));
    expect(block(":root:not([data-theme='light'])")).toEqual(lower('dark'));
    expect(block(":root[data-theme='dark']")).toEqual(lower('dark'));
  });
});

describe('useTheme', () => {
  const Show = () => {
    const { choice, scheme } = useTheme();
    return <p>{`${choice} ${scheme}`}</p>;
  };

  it('follows the system until somebody chooses, and keeps the choice', () => {
    render(<Show />);
    expect(screen.getByText('system light')).toBeInTheDocument();
    act(() => setDark(true));
    expect(screen.getByText('system dark')).toBeInTheDocument();
    act(() => chooseTheme('light'));
    expect(screen.getByText('light light')).toBeInTheDocument();
    expect(document.documentElement.dataset.theme).toBe('light');
    expect(localStorage.getItem('yardbell-theme')).toBe('light');
    act(() => chooseTheme('system'));
    expect(screen.getByText('system dark')).toBeInTheDocument();
    expect(localStorage.getItem('yardbell-theme')).toBeNull();
  });
});
