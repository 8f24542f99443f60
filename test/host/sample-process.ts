import type { JobContext, Json, OutputBody, Process, ProcessDescription } from '../../src/host/index.ts';

export const sampleDescription: ProcessDescription = {
  id: 'sample',
  version: '1.2.3',
  title: 'Sample',
  description: 'For tests of the host.',
  jobControlOptions: ['async-execute', 'dismiss'],
  outputTransmission: ['value'],
  inputs: {
    places: {
      title: 'some places',
      description: '',
      schema: { type: 'string' },
      maxOccurs: 3,
    },
    depth: {
      title: 'least depth, metres',
      description: '',
      schema: { type: 'number', minimum: 0, maximum: 10, default: 2 },
      minOccurs: 0,
    },
    side: {
      title: 'which side',
      description: '',
      schema: { type: 'string', enum: ['left', 'right'] },
      minOccurs: 0,
    },
    count: { title: 'how many', description: '', schema: { type: 'integer' }, minOccurs: 0 },
    wet: { title: 'whether wet', description: '', schema: { type: 'boolean' }, minOccurs: 0 },
    code: {
      title: 'a code, as EPSG:code',
      description: '',
      schema: { type: 'string', pattern: '^EPSG:[0-9]+$' },
      minOccurs: 0,
    },
  },
  outputs: { answer: { title: 'Answer', description: '', schema: { type: 'object' } } },
};

/** A process with that description and any work. */
export function sampleProcess(
  run: (context: JobContext, inputs: Readonly<Record<string, Json>>) => Promise<Record<string, OutputBody>>,
): Process<null> {
  return { description: sampleDescription, run: (inputs, context) => run(context, inputs) };
}
