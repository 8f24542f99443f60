import { readFileSync } from 'node:fs';
import { type Schema, Validator } from '@cfworker/json-schema';
import { describe, expect, it } from 'vitest';
import { builtInProcesses } from '../../src/engine/index.ts';

/**
 * Source: the schemas of OGC API – Processes – Part 1: Core 1.0 (OGC 18-062r2); see test/data/ogcapi-processes. In
 * their dialect (OpenAPI 3.0) exclusive bounds are yes or no: draft 4.
 */
const files = [
  'process',
  'processSummary',
  'descriptionType',
  'inputDescription',
  'outputDescription',
  'schema',
  'reference',
  'jobControlOptions',
  'transmissionMode',
  'metadata',
  'additionalParameter',
  'link',
];

function read(file: string): Schema {
  const text = readFileSync(`test/data/ogcapi-processes/${file}.json`, 'utf8');
  return { ...JSON.parse(text), id: `https://schemas.test/${file}.yaml` };
}

const validator = new Validator(read('process'), '4', false);
for (const file of files.slice(1)) validator.addSchema(read(file));

const described = builtInProcesses()
  .list()
  .map(({ description }) => description);

describe.each(described)('description of $id', (description) => {
  it('keeps the published schema', () => {
    const { valid, errors } = validator.validate(JSON.parse(JSON.stringify(description)));
    expect(errors).toEqual([]);
    expect(valid).toBe(true);
  });

  it('says in each title what the input is and gives every output a media type that the files are named by', () => {
    for (const { title, description: text } of Object.values(description.inputs)) {
      expect(title.length).toBeGreaterThan(8);
      expect(text).toMatch(/\.$/);
    }
    for (const { schema } of Object.values(description.outputs)) {
      expect(schema.contentMediaType).toMatch(/^(application\/(geo\+)?json|image\/tiff; )/);
    }
  });
});

it('would notice a description that breaks the schema', () => {
  const [first] = described;
  const broken = [
    { ...first, id: 7 },
    { ...first, version: undefined },
    { ...first, jobControlOptions: ['run-away'] },
    { ...first, inputs: { a: { title: 'without a schema' } } },
    { ...first, inputs: { a: { title: 'a', schema: { type: 'colour' } } } },
    { ...first, inputs: { a: { title: 'a', schema: { type: 'string', length: 3 } } } },
    { ...first, outputs: { a: {} } },
  ];
  for (const description of broken) {
    expect(validator.validate(JSON.parse(JSON.stringify(description))).valid).toBe(false);
  }
});
