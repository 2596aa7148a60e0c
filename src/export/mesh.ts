// Mesh files of the surface of a zonotope.
import { InputError } from '../errors.js';
import type { Solid } from '../zonotope/solid.js';
import { batched } from './chunks.js';
import { gltfPieces } from './mesh-gltf.js';
import { objLines } from './mesh-obj.js';
import { plyLines } from './mesh-ply.js';
import { stlLines } from './mesh-stl.js';

export type MeshFormat = 'obj' | 'ply' | 'stl' | 'gltf';

const writers: Readonly<Record<MeshFormat, (solid: Solid) => Iterable<string>>> = {
  obj: objLines,
  ply: plyLines,
  stl: stlLines,
  gltf: gltfPieces,
};

/** The format by the ending of a file's name; InputError where it tells none. */
export function meshFormatOf(fileName: string): MeshFormat {
  const ending = /\.([A-Za-z]+)$/.exec(fileName)?.[1]?.toLowerCase() ?? '';
  if (Object.hasOwn(writers, ending)) return ending as MeshFormat;
  throw new InputError(
    `${fileName}: the ending does not tell a mesh format`,
    'end the name in .obj, .ply, .stl or .gltf',
  );
}

/**
 * The file as chunks of text. InputError where two vertices are nearer to each other than the numbers
 * of the format can tell.
 */
export function meshText(format: MeshFormat, solid: Solid): Iterable<string> {
  return batched(writers[format](solid));
}
