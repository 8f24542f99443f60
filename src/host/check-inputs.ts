import { type Schema, Validator } from '@cfworker/json-schema';
import { OverbrimError } from '../core/error.ts';
import {
  type InputDescription,
  isList,
  isRequired,
  type Json,
  type ProcessDescription,
} from './description.ts';
import type { Inputs } from './process.ts';

/**
 * Checks inputs against a description and fills in defaults. The validator interprets schemas and generates no
 * code, so it works under policies that forbid that.
 * @throws OverbrimError `bad-input` naming the input, the value found and what was expected.
 */
export function checkedInputs(
  description: ProcessDescription,
  given: Readonly<Record<string, Json>>,
): Inputs {
  for (const name of Object.keys(given)) {
    if (!Object.hasOwn(description.inputs, name)) {
      const known = Object.keys(description.inputs).join(', ');
      throw new OverbrimError(
        'bad-input',
        `The process ${description.id} has no input "${name}"; it takes ${known}.`,
      );
    }
  }
  const checked: Record<string, Json> = {};
  for (const [name, input] of Object.entries(description.inputs)) {
    const value = Object.hasOwn(given, name) ? given[name] : undefined;
    if (value === undefined) {
      if (isRequired(input)) {
        throw new OverbrimError(
          'bad-input',
          `The input "${name}" (${input.title}) is missing; the process ${description.id} cannot run without it, so give it.`,
        );
      }
      if (input.schema.default !== undefined) checked[name] = input.schema.default;
      continue;
    }
    checked[name] = isList(input) ? checkedList(name, input, value) : checkedValue(name, input, value);
  }
  return checked;
}

function checkedList(name: string, input: InputDescription, value: Json): Json {
  const list: readonly Json[] = Array.isArray(value) ? value : [value];
  const least = input.minOccurs ?? 1;
  const most = input.maxOccurs === 'unbounded' ? Number.POSITIVE_INFINITY : (input.maxOccurs ?? 1);
  if (list.length < least || list.length > most) {
    throw new OverbrimError(
      'bad-input',
      `The input "${name}" has ${list.length} values; expected ${least} to ${most === Number.POSITIVE_INFINITY ? 'any number' : most}.`,
    );
  }
  return list.map((entry) => checkedValue(name, input, entry));
}

function checkedValue(name: string, input: InputDescription, value: Json): Json {
  const result = new Validator(input.schema as Schema, '7', true).validate(value);
  // JSON has no NaN and no infinity, but a program may hand them over.
  if (!result.valid || (typeof value === 'number' && !Number.isFinite(value))) {
    throw new OverbrimError(
      'bad-input',
      `The input "${name}" is ${shown(value)}; expected ${expectation(input, value)}.`,
    );
  }
  return value;
}

function shown(value: Json): string {
  const text = typeof value === 'number' ? String(value) : JSON.stringify(value);
  return text.length > 80 ? `${text.slice(0, 77)}…` : text;
}

/** What a schema asks for, in words. */
function expectation(input: InputDescription, value: Json): string {
  const { schema } = input;
  // A pattern is for machines; the title says the same in words.
  if (schema.pattern !== undefined && typeof value === 'string') return input.title;
  if (schema.enum !== undefined) return `one of ${schema.enum.join(', ')}`;
  const range = [
    schema.minimum === undefined ? '' : ` of at least ${schema.minimum}`,
    schema.maximum === undefined ? '' : ` and at most ${schema.maximum}`,
  ].join('');
  const kind =
    schema.type === undefined
      ? 'a value'
      : `a ${schema.type === 'boolean' ? 'yes or no (true, false)' : schema.type}`;
  return `${kind.replace('a integer', 'a whole number')}${range}: ${input.title}`;
}
