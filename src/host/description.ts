/**
 * A process described as OGC API – Processes Part 1 has it (OGC 18-062r2, clause 7.10): what it is, what it takes and
 * what it gives, with a JSON Schema for each. The description is all that forms, the command line and servers know.
 */
export interface ProcessDescription {
  readonly id: string;
  readonly version: string;
  readonly title: string;
  readonly description: string;
  readonly keywords?: readonly string[];
  readonly jobControlOptions: readonly ('sync-execute' | 'async-execute' | 'dismiss')[];
  readonly outputTransmission: readonly ('value' | 'reference')[];
  readonly inputs: Readonly<Record<string, InputDescription>>;
  readonly outputs: Readonly<Record<string, OutputDescription>>;
}

export interface InputDescription {
  readonly title: string;
  readonly description: string;
  readonly schema: JsonSchema;
  /** Default 1; 0 = may be left out. */
  readonly minOccurs?: number;
  /** Default 1; more = the input is a list of values. */
  readonly maxOccurs?: number | 'unbounded';
}

export interface OutputDescription {
  readonly title: string;
  readonly description: string;
  readonly schema: JsonSchema;
}

/** JSON Schema as far as OGC API – Processes 1.0 allows it (OpenAPI 3.0 schema objects). */
export interface JsonSchema {
  readonly type?: 'string' | 'number' | 'integer' | 'boolean' | 'object' | 'array';
  readonly enum?: readonly (string | number)[];
  readonly default?: Json;
  readonly minimum?: number;
  readonly maximum?: number;
  readonly pattern?: string;
  readonly items?: JsonSchema;
  readonly required?: readonly string[];
  readonly properties?: Readonly<Record<string, JsonSchema>>;
  readonly oneOf?: readonly JsonSchema[];
  readonly format?: string;
  readonly contentMediaType?: string;
  readonly contentEncoding?: string;
}

export type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };

/** Whether an input takes a list of values. */
export function isList(input: InputDescription): boolean {
  return input.maxOccurs !== undefined && input.maxOccurs !== 1;
}

/** Whether an input must be given. */
export function isRequired(input: InputDescription): boolean {
  return (input.minOccurs ?? 1) > 0;
}

/** Media type of an output: its schema's `contentMediaType`, else JSON. */
export function mediaTypeOf(output: OutputDescription): string {
  return output.schema.contentMediaType ?? 'application/json';
}
