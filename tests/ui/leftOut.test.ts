import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';

import { describe, expect, it } from 'vitest';

import { standIn, unusedNative, unusedRouter } from '@/scripts/bundle/leftOut';

const sources = ['app', 'components', 'hooks', 'lib'].flatMap((room) =>
  readdirSync(room, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && /\.tsx?$/.test(entry.name))
    .map((entry) => path.join(entry.parentPath, entry.name)),
);

/** Names that a file takes from a package, types left aside. */
function taken(file: string, from: string): string[] {
  const text = readFileSync(file, 'utf8');
  const imports = text.matchAll(new RegExp(`import \\{([^}]*)\\} from '${from}'`, 'g'));
  return [...imports].flatMap((one) => (one[1] ?? '').split(',').map((name) => name.trim().split(' as ')[0] ?? ''));
}

describe('what the bundle leaves out', () => {
  it('reads the sources at all', () => {
    expect(sources.length).toBeGreaterThan(40);
    expect(taken('components/ui/Rail.tsx', 'react-native')).toContain('Pressable');
  });

  it.each([
    ['react-native', unusedNative],
    ['expo-router', unusedRouter],
  ])('of %s is used by no file of ours', (from, left) => {
    const used = sources.flatMap((file) =>
      taken(file, from)
        .filter((name) => left.includes(name))
        .map((name) => `${file}: ${name}`),
    );
    expect(used).toEqual([]);
  });

  it('leaves everything else alone', () => {
    expect(standIn('/x/node_modules/react-native-web/dist/index.js', './exports/View')).toBeUndefined();
    expect(standIn('/x/node_modules/react-native-web/dist/index.js', './exports/FlatList')).toEqual({});
    expect(standIn('/x/components/ui/Rail.tsx', './exports/FlatList')).toBeUndefined();
  });
});
