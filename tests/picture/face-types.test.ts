// Types of faces against grouping with plain strings, on random small arrangements.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { FacePoset } from '../../src/face/poset.js';
import { findFaceTypes } from '../../src/picture/face-types.js';
import { faceSigns, selectFaces } from '../../src/picture/selection.js';
import { arrangementOf, smallRows } from '../support/arrangements.js';
import { slowPoset } from '../support/slow-poset.js';

function boundsOf(poset: FacePoset): { below: number[]; above: number[] } {
  const below = new Array<number>(poset.faceCount).fill(0);
  for (const target of poset.coverTargets) below[target]++;
  const above = below.map((_, f) => poset.coverOffsets[f + 1] - poset.coverOffsets[f]);
  return { below, above };
}

const inputs = smallRows({ dimension: 3, maximum: 6 }).map((rows) => arrangementOf(rows));

describe('types of faces', () => {
  it('are what counting says', () => {
    fc.assert(
      fc.property(inputs, (arrangement) => {
        const poset = slowPoset(arrangement);
        const signs = faceSigns(arrangement, poset);
        const { below, above } = boundsOf(poset);
        const wanted = new Map<string, number>();
        for (let k = 0; k <= poset.rank; k++) {
          for (let f = poset.dimensionOffsets[k]; f < poset.dimensionOffsets[k + 1]; f++) {
            const zeros = new Set(
              [...signs(f)].flatMap((s, i) => (s === '0' ? [arrangement.hyperplaneOf[i]] : [])),
            );
            const key = [k, zeros.size, below[f], above[f]].join();
            wanted.set(key, (wanted.get(key) ?? 0) + 1);
          }
        }
        const { types, joins } = findFaceTypes(
          poset,
          selectFaces(arrangement, poset, { kind: 'whole' }),
          1000,
        );
        const found = types.map(({ layer, count, hyperplanes, covers, coveredBy }) => {
          for (const [least, most] of [hyperplanes, covers, coveredBy]) expect(least).toBe(most);
          return [[layer, hyperplanes[0], covers[0], coveredBy[0]].join(), count] as const;
        });
        expect(new Map(found)).toEqual(wanted);
        // The joins of a type, up or down, are its faces times what each is joined to.
        types.forEach(({ count, covers, coveredBy }, t) => {
          const total = (end: 'low' | 'high') =>
            joins.reduce((sum, join) => (join[end] === t ? sum + join.count : sum), 0);
          expect(total('low')).toBe(count * coveredBy[0]);
          expect(total('high')).toBe(count * covers[0]);
        });
      }),
    );
  });

  it('get coarser until they are few enough, and keep every face and cover', () => {
    fc.assert(
      fc.property(inputs, fc.integer({ min: 1, max: 3 }), (arrangement, most) => {
        const poset = slowPoset(arrangement);
        const { types, joins } = findFaceTypes(
          poset,
          selectFaces(arrangement, poset, { kind: 'whole' }),
          most,
        );
        for (let k = 0; k <= poset.rank; k++) {
          const layer = types.filter((type) => type.layer === k);
          expect(layer.length).toBeLessThanOrEqual(most);
          expect(layer.reduce((sum, { count }) => sum + count, 0)).toBe(
            poset.dimensionOffsets[k + 1] - poset.dimensionOffsets[k],
          );
        }
        expect(joins.reduce((sum, { count }) => sum + count, 0)).toBe(poset.coverTargets.length);
      }),
    );
  });
});
