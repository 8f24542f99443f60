import { OverbrimError } from '../core/error.ts';
import type { Process } from './process.ts';

/** The processes that a host offers, by id. */
export class Registry<Resources> {
  readonly #processes = new Map<string, Process<Resources>>();

  /** @throws OverbrimError `bad-input` when the id is taken or no id. */
  register(process: Process<Resources>): this {
    const { id } = process.description;
    if (!/^[a-z][a-z0-9-]*$/.test(id)) {
      throw new OverbrimError(
        'bad-input',
        `The process id is "${id}"; expected lower-case letters, digits and hyphens, so rename it.`,
      );
    }
    if (this.#processes.has(id)) {
      throw new OverbrimError(
        'bad-input',
        `A process with the id "${id}" is registered already; choose another id.`,
      );
    }
    this.#processes.set(id, process);
    return this;
  }

  /** In the order of registration. */
  list(): readonly Process<Resources>[] {
    return [...this.#processes.values()];
  }

  /** @throws OverbrimError `bad-input` when there is none of that id. */
  get(id: string): Process<Resources> {
    const process = this.#processes.get(id);
    if (process === undefined) {
      throw new OverbrimError(
        'bad-input',
        `There is no process "${id}"; expected one of ${[...this.#processes.keys()].join(', ')}.`,
      );
    }
    return process;
  }
}
