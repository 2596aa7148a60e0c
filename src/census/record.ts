// The record of a census: a plain JSON value with a schema. Integers that can pass 2^53 are decimal
// strings; what cannot be had is null, with the reason in `notes`. Exporters, pages and audits read
// the record, never the kernels.
import { z } from 'zod';
import type published from './record.schema.json';

const integer = z.string().regex(/^-?\d+$/);
const natural = z.string().regex(/^\d+$/);
const count = z.int().nonnegative();
const number = z.string().describe('an exact number as users write it: 12, -3/4, 1/2+3/2*sqrt(5)');

const input = z.strictObject({
  title: z.string().nullable(),
  source: z.string().describe('the name the input went by'),
  sha256: z.string().nullable().describe('of the bytes read; null for lists made in memory'),
  normalCount: count,
  ambientDimension: count,
  field: z.string().regex(/^Q(\(sqrt\(\d+\)\))?$/),
  coordinates: z.array(z.string()).nullable(),
  labels: z.array(z.string().nullable()).nullable(),
  normals: z.array(z.array(number)).describe('one normal a row, exactly as read'),
  ranges: z
    .array(z.tuple([number, number]))
    .nullable()
    .describe('low and high of each generator; null means 0..1 throughout'),
});

const arrangement = z.strictObject({
  hyperplanes: count,
  rank: count,
  lineality: count.describe('dimension of the subspace on all hyperplanes'),
  parallelClasses: z
    .array(z.array(count))
    .describe('1-based numbers of normals, a hyperplane each'),
});

const characteristicPolynomial = z.strictObject({
  coefficients: z.array(integer).describe('from t^0 up, in the ambient dimension'),
  text: z.string(),
  integerRoots: z.array(integer).nullable().describe('all roots, ascending, if all are integers'),
});

const properties = z.strictObject({
  simplicial: z.boolean().nullable(),
  generic: z.boolean().nullable(),
  irreducible: z.boolean().nullable(),
  supersolvable: z.boolean().nullable(),
  linesByMultiplicity: z
    .record(z.string().regex(/^\d+$/), natural)
    .nullable()
    .describe('rank 3 only: how many lines lie on exactly k hyperplanes, by k'),
});

const zonotope = z.strictObject({
  faces: z.array(natural).nullable().describe('by dimension 0..rank; vertices first'),
  volume: number
    .nullable()
    .describe('relative to the lattice of the span; over Q(sqrt(k)), to its basis'),
  euclideanVolume: z
    .strictObject({ square: number, decimal: z.string() })
    .nullable()
    .describe('its square, exact, and 15 digits of it'),
  scale: natural
    .nullable()
    .describe('what the generators are multiplied by for all that follows, to be integer'),
  ehrhart: z.array(number).nullable().describe('from t^0 up; null where it is a quasi-polynomial'),
  quasiPolynomial: z
    .array(z.strictObject({ divisor: natural, coefficients: z.array(number) }))
    .nullable()
    .describe('the polynomial for the t whose greatest common divisor with the period is divisor'),
  latticePoints: natural.nullable(),
  interiorPoints: natural.nullable(),
  boundaryPoints: natural.nullable(),
  unscaled: z
    .strictObject({ latticePoints: natural, interiorPoints: natural })
    .nullable()
    .describe('of the zonotope itself, counted one by one, where scale is not 1 and it is small'),
  elementaryDivisors: z.array(natural).nullable().describe('of the matrix of generators'),
  sublatticeIndex: natural.nullable().describe('of the lattice that the generators span'),
});

const check = z.strictObject({
  claim: z.string(),
  routes: z.array(z.strictObject({ route: z.string(), value: z.string() })).min(2),
  agrees: z.boolean(),
});

const run = z.strictObject({
  version: z.string(),
  seconds: z.number().nonnegative(),
  threads: z.int().positive(),
  notRun: z.array(z.strictObject({ route: z.string(), why: z.string() })),
});

/** The schema; `record.schema.json` beside it is the same as JSON Schema. */
export const recordSchema = z.strictObject({
  schema: z.literal('signwright/record/1'),
  input,
  arrangement,
  regions: natural,
  faces: z.array(natural).nullable().describe('by dimension above the lineality space, 0..rank'),
  flats: z.array(natural).nullable().describe('by rank 0..rank'),
  characteristicPolynomial,
  properties,
  zonotope,
  checks: z.array(check),
  lists: z.array(
    z.strictObject({ kind: z.string(), file: z.string(), sha256: z.string(), rows: count }),
  ),
  run,
  notes: z.array(z.string()),
});

export type CensusRecord = z.infer<typeof recordSchema>;
export type Check = z.infer<typeof check>;
export type NotRun = CensusRecord['run']['notRun'][number];

/** The record as JSON Schema (draft 2020-12): what `record.schema.json` holds. */
export function recordJsonSchema(): typeof published {
  return z.toJSONSchema(recordSchema, {
    override: ({ zodSchema, jsonSchema }) => {
      if (zodSchema === recordSchema) jsonSchema.title = 'Record of a signwright census';
    },
  }) as unknown as typeof published;
}
