import { type Command, Option } from 'commander';
import { OverbrimError } from '../core/index.ts';
import { type InputDescription, isList, type Json, type ProcessDescription } from '../host/index.ts';

/** What the command line gave for a process: values by input id, as text or true. */
export type GivenOptions = Readonly<Record<string, string | readonly string[] | boolean | undefined>>;

/** The option of an input: `verticalUnit` becomes `--vertical-unit`. */
export function flagOf(input: string): string {
  return `--${input.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
}

/** Adds an option for each input of a process. */
export function addProcessOptions(command: Command, { inputs }: ProcessDescription): void {
  for (const [id, input] of Object.entries(inputs)) {
    const { schema } = input;
    const isBoolean = schema.type === 'boolean';
    const value = isBoolean ? '' : isList(input) ? ' <value...>' : ' <value>';
    const usual = schema.default === undefined || isBoolean ? '' : ` (usually ${schema.default})`;
    const option = new Option(`${flagOf(id)}${value}`, `${input.title}${usual}`);
    command.addOption(option);
  }
  command.option('--input <name=value...>', 'any input by its name, as name=value');
}

/** Coordinates that start with a minus, given a space in front so that they are not taken for options. */
export function shielded(arg: string): string {
  return /^-[\d.][^,]*,/.test(arg) ? ` ${arg}` : arg;
}

/** Inputs of a process from its options and from `--input name=value`. */
export function inputsOf(description: ProcessDescription, given: GivenOptions): Record<string, Json> {
  const inputs: Record<string, Json> = {};
  for (const [id, input] of Object.entries(description.inputs)) {
    const value = given[id];
    if (value === undefined) continue;
    if (typeof value === 'boolean') inputs[id] = value;
    else if (typeof value === 'string') inputs[id] = parsed(flagOf(id), input, value);
    else inputs[id] = value.map((text) => parsed(flagOf(id), input, text));
  }
  const named = given.input;
  if (!Array.isArray(named)) return inputs;
  for (const text of named as readonly string[]) {
    const equals = text.indexOf('=');
    const id = text.slice(0, equals);
    const input = Object.hasOwn(description.inputs, id) ? description.inputs[id] : undefined;
    if (equals < 1 || input === undefined) {
      throw new OverbrimError(
        'bad-input',
        `--input was given "${text}"; expected name=value with one of the names ${Object.keys(description.inputs).join(', ')}.`,
      );
    }
    const value = parsed(`--input ${id}`, input, text.slice(equals + 1));
    const held = inputs[id];
    inputs[id] = isList(input) && Array.isArray(held) ? [...held, value] : isList(input) ? [value] : value;
  }
  return inputs;
}

/** A value typed as text, by the type that its schema asks for. */
function parsed(option: string, { schema, title }: InputDescription, text: string): Json {
  switch (schema.type) {
    case 'number':
    case 'integer': {
      const value = text.trim() === '' ? Number.NaN : Number(text);
      if (!Number.isFinite(value)) {
        throw new OverbrimError('bad-input', `${option} is "${text}"; expected a number: ${title}.`);
      }
      return value;
    }
    case 'boolean':
      if (text !== 'true' && text !== 'false') {
        throw new OverbrimError('bad-input', `${option} is "${text}"; expected true or false: ${title}.`);
      }
      return text === 'true';
    case 'object':
    case 'array':
      try {
        return JSON.parse(text);
      } catch (cause) {
        throw new OverbrimError('bad-input', `${option} is not JSON: ${title}.`, { cause });
      }
    default:
      return text.replace(/^ (?=-)/, '');
  }
}
