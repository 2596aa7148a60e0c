// glTF 2.0 (Khronos Group, 2021) as one JSON text with its buffer inside: triangles by number of
// sides, edges as lines by the normals they run along, names and order kept.
import type { Solid } from '../zonotope/solid.js';
import { placeVertices } from '../zonotope/solid-place.js';
import {
  classNames,
  generatorName,
  meshNotes,
  sideClass,
  sideClassName,
  sideTints,
  solidTitle,
} from './mesh-words.js';

// Numbers of the specification, sections 5.1 and 5.24.
const float = 5126;
const unsignedInt = 5125;
const arrayBuffer = 34962;
const elementArrayBuffer = 34963;
const lines = 1;
const triangles = 4;

/** A quarter turn about x: our third axis points up, where the format has its second. */
const upright = [-Math.SQRT1_2, 0, 0, Math.SQRT1_2];

/** Pieces of the JSON text. */
export function* gltfPieces(solid: Solid): Generator<string> {
  const { vertices, faces, edges, projection } = solid;
  const positions = Float32Array.from(placeVertices(projection, vertices, true));
  const fans: number[][] = sideTints.map(() => []);
  for (const { vertices: corners } of faces) {
    const list = fans[sideClass(corners.length)];
    for (let i = 1; i + 1 < corners.length; i++) list.push(corners[0], corners[i], corners[i + 1]);
  }
  const runs: number[][] = projection.arrangement.hyperplanes.map(() => []);
  for (const { from, to, along } of edges) runs[along].push(from, to);

  const shapes = [...fans.keys()].filter((i) => fans[i].length > 0);
  const indices = [...shapes.map((i) => fans[i]), ...runs];
  const buffer = new Uint8Array(
    positions.byteLength + 4 * indices.reduce((sum, list) => sum + list.length, 0),
  );
  const view = new DataView(buffer.buffer);
  positions.forEach((x, i) => {
    view.setFloat32(4 * i, x, true);
  });
  let offset = positions.byteLength;
  const accessors: unknown[] = [
    {
      bufferView: 0,
      componentType: float,
      count: vertices.length,
      type: 'VEC3',
      ...extremes(positions),
    },
  ];
  for (const list of indices) {
    accessors.push({
      bufferView: 1,
      byteOffset: offset - positions.byteLength,
      componentType: unsignedInt,
      count: list.length,
      type: 'SCALAR',
    });
    for (const v of list) {
      view.setUint32(offset, v, true);
      offset += 4;
    }
  }
  const edgeMaterial = shapes.length;
  const names = classNames(projection);
  const document = {
    asset: { version: '2.0', generator: 'signwright' },
    scene: 0,
    scenes: [{ name: solidTitle(solid), nodes: [0] }],
    nodes: [
      {
        name: solidTitle(solid),
        rotation: upright,
        children: [1, 2],
        extras: {
          notes: meshNotes(solid),
          normals: projection.arrangement.generators.normals.map((_, j) =>
            generatorName(projection, j),
          ),
          precision: 'positions are rounded further, to 32-bit floats, as the format asks',
        },
      },
      { name: 'faces', mesh: 0 },
      { name: 'edges', children: runs.map((_, h) => 3 + h) },
      ...runs.map((_, h) => ({ name: `edges along ${names[h]}`, mesh: 1 + h })),
    ],
    meshes: [
      {
        name: 'faces',
        primitives: shapes.map((_, i) => ({
          attributes: { POSITION: 0 },
          indices: 1 + i,
          material: i,
          mode: triangles,
        })),
      },
      ...runs.map((_, h) => ({
        name: `edges along ${names[h]}`,
        primitives: [
          {
            attributes: { POSITION: 0 },
            indices: 1 + shapes.length + h,
            material: edgeMaterial,
            mode: lines,
          },
        ],
      })),
    ],
    materials: [
      ...shapes.map((i) => material(sideClassName(i), sideTints[i])),
      material('edges', '#1f2328'),
    ],
    accessors,
    bufferViews: [
      { buffer: 0, byteLength: positions.byteLength, target: arrayBuffer },
      {
        buffer: 0,
        byteOffset: positions.byteLength,
        byteLength: buffer.byteLength - positions.byteLength,
        target: elementArrayBuffer,
      },
    ],
  };
  const text = JSON.stringify(document, null, 1);
  yield text.slice(0, text.lastIndexOf('\n}'));
  yield `,\n "buffers": [{ "byteLength": ${buffer.byteLength}, "uri": "data:application/octet-stream;base64,`;
  // Multiples of three bytes become text without padding between them.
  for (let i = 0; i < buffer.length; i += 24576) {
    yield btoa(String.fromCharCode(...buffer.subarray(i, i + 24576)));
  }
  yield '" }]\n}\n';
}

function extremes(positions: Float32Array): { min: number[]; max: number[] } {
  const min = [0, 1, 2].map((i) => positions[i]);
  const max = min.slice();
  positions.forEach((x, i) => {
    if (x < min[i % 3]) min[i % 3] = x;
    if (x > max[i % 3]) max[i % 3] = x;
  });
  return { min, max };
}

function material(name: string, colour: string): unknown {
  // The format wants linear light; the formula is that of sRGB (IEC 61966-2-1, 1999).
  const linear = [1, 3, 5].map((i) => {
    const c = Number.parseInt(colour.slice(i, i + 2), 16) / 255;
    return Number((c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4).toFixed(4));
  });
  return {
    name,
    pbrMetallicRoughness: {
      baseColorFactor: [...linear, 1],
      metallicFactor: 0,
      roughnessFactor: 0.9,
    },
  };
}
