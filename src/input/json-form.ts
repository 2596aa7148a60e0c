// The JSON form as one zod schema: what readers accept, and the JSON Schema that is published for it
// (arrangement.schema.json beside this file; a test holds the two equal).
import { z } from 'zod';
import type published from './arrangement.schema.json';

/** A JSON number as written, digit by digit. */
export class Numeral {
  readonly text: string;
  constructor(text: string) {
    this.text = text;
  }
}

const numeral = z.instanceof(Numeral);
const number = z.union([numeral, z.string()]);
const normal = z.array(number).min(1);

/** Validates what the JSON reader parsed, its numbers being Numerals. */
export const jsonForm = z.strictObject({
  $schema: z.string().optional(),
  title: z.string().nullable().optional().describe('What the arrangement is called'),
  coordinates: z
    .array(z.string())
    .min(1)
    .nullable()
    .optional()
    .describe('A distinct name for each coordinate'),
  normals: z
    .array(normal)
    .min(1)
    .describe(
      'One array a normal, all of the same length, none of them zero. Numbers are read digit by digit; fractions and roots are strings such as "-3/4" and "2+3*sqrt(5)"',
    ),
  labels: z
    .array(z.string().nullable())
    .nullable()
    .optional()
    .describe('A label for each normal, or null; no label twice'),
  ranges: z
    .array(z.tuple([number, number]))
    .nullable()
    .optional()
    .describe('From low to high for each generator; 0 to 1 where absent'),
});

/** A document of the JSON form. */
export type JsonForm = z.infer<typeof jsonForm>;

/** The JSON Schema (draft 2020-12) of the JSON form, made from the schema the reader itself uses. */
export function arrangementSchema(): Record<string, unknown> {
  return z.toJSONSchema(jsonForm, {
    unrepresentable: 'any',
    override: ({ zodSchema, jsonSchema }) => {
      if (zodSchema === jsonForm) {
        jsonSchema.title = 'signwright arrangement';
        jsonSchema.description = 'Normals of a central hyperplane arrangement, read exactly';
      }
      if (zodSchema === numeral) jsonSchema.type = 'number';
    },
  }) as unknown as typeof published;
}
