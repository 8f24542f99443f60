import type {
  InputDescription,
  Json,
  JsonSchema,
  OutputDescription,
  ProcessDescription,
} from './description.ts';
import type { Inputs, JobContext, OutputBody, Process } from './process.ts';

/** The type of values that a schema allows. */
type ValueOf<S extends JsonSchema> = S extends { readonly enum: readonly (infer E)[] }
  ? E
  : S extends { readonly type: 'string' }
    ? string
    : S extends { readonly type: 'number' | 'integer' }
      ? number
      : S extends { readonly type: 'boolean' }
        ? boolean
        : Json;

type OneOrList<I extends InputDescription> = I extends { readonly maxOccurs: infer M }
  ? M extends 1
    ? ValueOf<I['schema']>
    : readonly ValueOf<I['schema']>[]
  : ValueOf<I['schema']>;

type IsOptional<I extends InputDescription> = I extends { readonly minOccurs: 0 }
  ? I['schema'] extends { readonly default: Json }
    ? false
    : true
  : false;

/** Inputs as they reach a process, typed by their descriptions: checked, with defaults filled in. */
export type InputsOf<D extends Readonly<Record<string, InputDescription>>> = {
  readonly [Id in keyof D]: IsOptional<D[Id]> extends true ? OneOrList<D[Id]> | undefined : OneOrList<D[Id]>;
};

/** A body for each output of a description. */
export type OutputsOf<D extends Readonly<Record<string, OutputDescription>>> = {
  readonly [Id in keyof D]: OutputBody;
};

/**
 * A process from its description and its function, whose inputs and outputs are typed by the description. The host
 * checks inputs before it runs, so they are what their types say.
 */
export function defineProcess<const D extends ProcessDescription, Resources>(definition: {
  readonly description: D;
  run(
    inputs: InputsOf<D['inputs']>,
    context: JobContext,
    resources: Resources,
  ): Promise<OutputsOf<D['outputs']>>;
}): Process<Resources> {
  const { description } = definition;
  return {
    description,
    run: (inputs: Inputs, context, resources) =>
      definition.run(inputs as InputsOf<D['inputs']>, context, resources),
  };
}
