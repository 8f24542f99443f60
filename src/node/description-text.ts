import { isList, isRequired, mediaTypeOf, type ProcessDescription } from '../host/index.ts';
import { flagOf } from './process-options.ts';

/** A process description for reading on a terminal. */
export function descriptionText({
  id,
  version,
  title,
  description,
  inputs,
  outputs,
}: ProcessDescription): string {
  const lines = [`${id} ${version}: ${title}`, '', description, '', 'Inputs'];
  for (const [name, input] of Object.entries(inputs)) {
    const { schema } = input;
    const marks = [
      isRequired(input) ? 'needed' : '',
      isList(input) ? 'several' : '',
      schema.default === undefined ? '' : `usually ${schema.default}`,
    ].filter((mark) => mark !== '');
    lines.push(
      `  ${flagOf(name)}${marks.length > 0 ? ` (${marks.join(', ')})` : ''}`,
      `      ${input.title}`,
    );
    if (input.description !== '') lines.push(`      ${input.description}`);
  }
  lines.push('', 'Outputs');
  for (const [name, output] of Object.entries(outputs)) {
    lines.push(`  ${name} (${mediaTypeOf(output)})`, `      ${output.description}`);
  }
  return `${lines.join('\n')}\n`;
}
