import type { FeatureCollection } from 'geojson';
import type { Json } from '../host/index.ts';
import type { MessageKey } from './messages.ts';
import { foundPonds } from './ponds.ts';
import type { QuestionKind } from './running.ts';
import type { Session, TerrainInputs } from './session.ts';
import { tracedPath } from './traced-path.ts';
import { Voice } from './voice.ts';
import { pageSentence } from './words.ts';

/** Least sizes of ponds to show, in metres, square and cubic metres. */
export interface LeastSizes {
  readonly depthM: number;
  readonly areaM2: number;
  readonly capacityM3: number;
}

/** Titles of what runs. */
export const jobTitles: Readonly<Record<QuestionKind, MessageKey>> = {
  terrain: 'jobTerrain',
  ponds: 'jobPonds',
  path: 'jobPath',
};

/**
 * Surveys a terrain. Until that has ended well, the terrain that was there stays; then all answers about it go.
 * Without a vertical unit the state `withoutUnit` holds the question until a terrain is surveyed.
 */
export function surveyTerrain(
  session: Session,
  inputs: TerrainInputs,
  names: readonly string[],
): Promise<void> {
  return asked(session, 'terrain', async () => {
    try {
      const { view, notes } = await session.running.ask('terrain', (engine, tell) =>
        engine.view(inputs, tell),
      );
      session.running.dismiss('ponds', 'path');
      // What went wrong with the terrain before is no news of this one.
      forget(session, 'ponds');
      forget(session, 'path');
      session.put({
        withoutUnit: null,
        surveyed: { inputs, names, view, notes },
        ponds: null,
        selected: null,
        path: null,
        leg: null,
        said: voiceOf(session).say('terrainSurveyed', { columns: view.width, rows: view.height }),
      });
    } catch (error) {
      if (codeOf(error) !== 'unit-missing') throw error;
      const said = voiceOf(session).say('unitAnnounced', { name: names.join(', ') });
      session.put({ withoutUnit: { inputs, names }, said });
    }
  });
}

/** Finds the ponds of the surveyed terrain that reach the least sizes. */
export function findPonds(session: Session, least: LeastSizes): Promise<void> {
  return asked(session, 'ponds', async () => {
    const { outputs } = await session.running.ask('ponds', (engine, tell) =>
      engine.run(
        'depressions',
        {
          ...terrainOf(session),
          minDepth: least.depthM,
          minArea: least.areaM2,
          minCapacity: least.capacityM3,
        },
        tell,
      ),
    );
    const ponds = foundPonds(
      json<FeatureCollection>(outputs.ponds),
      json<FeatureCollection>(outputs['pour-points']),
      json<{ outermostPonds: number }>(outputs.summary),
    );
    const { selected } = session.state;
    session.put({
      ponds,
      selected: selected !== null && ponds.byId.has(selected) ? selected : null,
      said: voiceOf(session).say('pondsAnnounced', { count: ponds.list.length }),
    });
  });
}

/** Traces the spill path from a place x,y in the terrain's CRS, or in the one named. */
export function tracePath(session: Session, from: string, crs?: string): Promise<void> {
  return asked(session, 'path', async () => {
    const { outputs } = await session.running.ask('path', (engine, tell) =>
      engine.run('spill-path', { ...terrainOf(session), from, ...(crs === undefined ? {} : { crs }) }, tell),
    );
    const path = tracedPath(from, json<FeatureCollection>(outputs['spill-path']));
    session.put({
      path,
      leg: null,
      said: voiceOf(session).say('pathAnnounced', { count: path.legs.length }),
    });
  });
}

function terrainOf(session: Session): Readonly<Record<string, Json>> {
  return session.state.surveyed?.inputs ?? {};
}

function voiceOf({ state }: Session): Voice {
  return new Voice(state.lang, state.units);
}

/** Numbers of the faults that questions ended with, of each kind the last. */
const faults = new WeakMap<Session, Map<QuestionKind, number>>();

function forget(session: Session, kind: QuestionKind): void {
  const id = faults.get(session)?.get(kind);
  if (id === undefined) return;
  faults.get(session)?.delete(kind);
  session.forgetFault(id);
}

/** Keeps why a question has no answer until one of its kind is asked again. */
export function refuse(session: Session, kind: QuestionKind, code: string, message: string): void {
  forget(session, kind);
  const ofSession = faults.get(session) ?? new Map<QuestionKind, number>();
  faults.set(session, ofSession);
  ofSession.set(kind, session.fault(code, message));
}

/** Tells what goes wrong; what was dismissed for a newer question of its kind is no news. */
async function asked(session: Session, kind: QuestionKind, ask: () => Promise<void>): Promise<void> {
  forget(session, kind);
  try {
    await ask();
  } catch (error) {
    if (codeOf(error) !== 'cancelled') {
      const message = error instanceof Error ? error.message : String(error);
      refuse(session, kind, codeOf(error), pageSentence(session.state.lang, message));
    } else if (!session.running.jobs.some((job) => job.kind === kind)) {
      const voice = voiceOf(session);
      const isFirst = kind === 'terrain' && session.state.surveyed === null;
      const key = isFirst ? 'wasCancelledFirst' : 'wasCancelled';
      session.put({ said: voice.say(key, { title: voice.say(jobTitles[kind]) }) });
    }
  }
}

function codeOf(error: unknown): string {
  const code = error instanceof Error ? Reflect.get(error, 'code') : undefined;
  return typeof code === 'string' ? code : 'failed';
}

function json<T>({ bytes }: { readonly bytes: Uint8Array }): T {
  return JSON.parse(new TextDecoder().decode(bytes)) as T;
}
