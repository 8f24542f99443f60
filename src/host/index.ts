export { checkedInputs } from './check-inputs.ts';
export { defineProcess, type InputsOf, type OutputsOf } from './define-process.ts';
export {
  type InputDescription,
  isList,
  isRequired,
  type Json,
  type JsonSchema,
  mediaTypeOf,
  type OutputDescription,
  type ProcessDescription,
} from './description.ts';
export { Job, type JobOptions, type JobProgress, type JobResult, type JobStatus } from './job.ts';
export { JobQueue, type QueuedJob, type Work } from './job-queue.ts';
export { type Lineage, lineageOf, type Software } from './lineage.ts';
export type { Inputs, JobContext, OutputBody, Process } from './process.ts';
export { Registry } from './registry.ts';
export { software } from './software.ts';
