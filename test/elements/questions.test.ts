import { describe, expect, it } from 'vitest';
import { OverbrimError } from '../../src/core/error.ts';
import { findPonds, surveyTerrain, tracePath } from '../../src/elements/questions.ts';
import type { Engine, SurveyView } from '../../src/elements/running.ts';
import { Session } from '../../src/elements/session.ts';
import { JobQueue, type Json } from '../../src/host/index.ts';

type Inputs = Readonly<Record<string, Json>>;

const bytes = (value: unknown): { mediaType: string; bytes: Uint8Array } => ({
  mediaType: 'application/json',
  bytes: new TextEncoder().encode(JSON.stringify(value)),
});

/** An engine that answers with what it is given, and keeps what it was asked. */
function engineWith(outputs: Record<string, unknown>, viewFails?: OverbrimError) {
  const asked: [string, Inputs][] = [];
  const queue = new JobQueue();
  const view = { width: 3, height: 2 } as SurveyView;
  const engine = {
    run: (id: string, inputs: Inputs) => {
      asked.push([id, inputs]);
      const named = Object.entries(outputs).map(([name, value]) => [name, bytes(value)]);
      return queue.add(id, async () => ({ outputs: Object.fromEntries(named), notes: [] }));
    },
    view: (inputs: Inputs) => {
      asked.push(['view', inputs]);
      return queue.add('view', async () => {
        if (viewFails) throw viewFails;
        return { view, notes: ['A gap of 2 cells.'] };
      });
    },
  } as unknown as Engine;
  return { engine, asked, view };
}

const pond = (id: string, capacityM3: number, spillsInto: string | null) => ({
  type: 'Feature',
  geometry: null,
  properties: { id, capacityM3, areaM2: 10, spillsInto },
});

const found = {
  ponds: {
    type: 'FeatureCollection',
    features: [pond('b', 5, null), pond('c', 70, 'a'), pond('a', 5, 'b')],
  },
  'pour-points': {
    type: 'FeatureCollection',
    features: [
      { type: 'Feature', geometry: { type: 'Point', coordinates: [1, 2] }, properties: { pond: 'c' } },
    ],
  },
  summary: { outermostPonds: 9 },
};

describe('surveyTerrain', () => {
  it('keeps the survey, and forgets what was known of the terrain before', async () => {
    const { engine, view } = engineWith(found);
    const session = new Session(async () => engine);
    session.put({ selected: 'old', picking: false });
    await surveyTerrain(session, { terrain: ['x.tif'] }, ['x.tif']);
    expect(session.state.surveyed).toMatchObject({ view, names: ['x.tif'], notes: ['A gap of 2 cells.'] });
    expect(session.state.selected).toBe(null);
    expect(session.state.said).toBe('Terrain surveyed: 3 × 2 cells.');
  });

  it('turns a missing unit into a question, not an error', async () => {
    const { engine } = engineWith(found, new OverbrimError('unit-missing', 'No unit.'));
    const session = new Session(async () => engine);
    await surveyTerrain(session, { terrain: ['x.tif'] }, ['x.tif']);
    expect(session.state.withoutUnit).toEqual({ inputs: { terrain: ['x.tif'] }, names: ['x.tif'] });
    expect(session.state.faults).toEqual([]);
    expect(session.state.said).toBe(
      'In which unit are the elevations of x.tif? Answer in the card of the terrain.',
    );
  });

  it('keeps the question of the unit when the survey with its answer is cancelled', async () => {
    const missing = engineWith(found, new OverbrimError('unit-missing', 'No unit.')).engine;
    const engine = {
      ...missing,
      view: (inputs: Inputs) =>
        inputs.verticalUnit === undefined
          ? missing.view(inputs as never)
          : new JobQueue().add('view', () => new Promise(() => {})),
    } as unknown as Engine;
    const session = new Session(async () => engine);
    await surveyTerrain(session, { terrain: ['x.tif'] }, ['x.tif']);
    const answered = surveyTerrain(session, { terrain: ['x.tif'], verticalUnit: 'm' }, ['x.tif']);
    await new Promise((next) => setTimeout(next));
    session.running.dismiss('terrain');
    await answered;
    expect(session.state.withoutUnit).toEqual({ inputs: { terrain: ['x.tif'] }, names: ['x.tif'] });
    expect(session.state.said).toBe(
      'Surveying the terrain was cancelled. Nothing was there before, so nothing is shown yet.',
    );
  });

  it('takes a fault back when its kind is asked again, and only then', async () => {
    const good = engineWith(found);
    const bad = engineWith(found, new OverbrimError('unreadable', 'y.tif is no TIFF.'));
    let engine = bad.engine;
    const session = new Session(async () => ({
      ...good.engine,
      view: (...given: Parameters<Engine['view']>) => engine.view(...given),
    }));
    await surveyTerrain(session, { terrain: ['y.tif'] }, ['y.tif']);
    session.fault('failed', 'Something else.');
    await findPonds(session, { depthM: 0, areaM2: 0, capacityM3: 0 });
    expect(session.state.faults).toMatchObject([{ message: 'y.tif is no TIFF.' }, { code: 'failed' }]);
    engine = good.engine;
    await surveyTerrain(session, { terrain: ['x.tif'] }, ['x.tif']);
    expect(session.state.faults).toMatchObject([{ message: 'Something else.' }]);
  });

  it('keeps the terrain that was there when another cannot be read, and says why', async () => {
    const good = engineWith(found);
    const bad = engineWith(found, new OverbrimError('unreadable', 'y.tif is no TIFF.'));
    const engines = [good.engine, bad.engine];
    const session = new Session(async () => ({
      ...good.engine,
      view: (...given: Parameters<Engine['view']>) => (engines.shift() ?? bad.engine).view(...given),
    }));
    await surveyTerrain(session, { terrain: ['x.tif'] }, ['x.tif']);
    await surveyTerrain(session, { terrain: ['y.tif'] }, ['y.tif']);
    expect(session.state.surveyed?.names).toEqual(['x.tif']);
    expect(session.state.faults).toMatchObject([{ code: 'unreadable', message: 'y.tif is no TIFF.' }]);
  });
});

describe('findPonds', () => {
  it('asks with the least sizes and lists the largest first, equal ones by id', async () => {
    const { engine, asked } = engineWith(found);
    const session = new Session(async () => engine);
    await surveyTerrain(session, { terrain: ['x.tif'], edges: 'closed' }, ['x.tif']);
    session.put({ selected: 'gone' });
    await findPonds(session, { depthM: 0.1, areaM2: 20, capacityM3: 30 });
    expect(asked[1]).toEqual([
      'depressions',
      { terrain: ['x.tif'], edges: 'closed', minDepth: 0.1, minArea: 20, minCapacity: 30 },
    ]);
    const { ponds, selected, said } = session.state;
    expect(ponds?.list.map(({ id, number }) => [id, number])).toEqual([
      ['c', 1],
      ['a', 2],
      ['b', 3],
    ]);
    expect(ponds?.byId.get('c')?.pourPoint).toEqual([1, 2]);
    expect(ponds?.byId.get('a')?.pourPoint).toBe(null);
    expect(ponds).toMatchObject({ all: 9, capacityM3: 80, areaM2: 30 });
    expect(selected).toBe(null);
    expect(said).toBe('3 ponds found.');
  });
});

describe('tracePath', () => {
  const leg = (number: number, from: number, to: number, storageM3: number, endsAt: string | null) => ({
    type: 'Feature',
    geometry: null,
    properties: {
      leg: number,
      kind: storageM3 > 0 ? 'pond' : 'land',
      lengthM: 100,
      fromElevationM: from,
      toElevationM: to,
      storageM3,
      endsAt,
    },
  });

  it('sums the legs', async () => {
    const features = [leg(1, 9, 7, 0, null), leg(2, 7, 7, 40, null), leg(3, 7, 2, 0, 'outlet')];
    const { engine, asked } = engineWith({ 'spill-path': { type: 'FeatureCollection', features } });
    const session = new Session(async () => engine);
    await surveyTerrain(session, { terrain: ['x.tif'] }, ['x.tif']);
    await tracePath(session, '1,2', 'EPSG:4326');
    expect(asked[1]).toEqual(['spill-path', { terrain: ['x.tif'], from: '1,2', crs: 'EPSG:4326' }]);
    expect(session.state.path).toMatchObject({ lengthM: 300, dropM: 7, storageM3: 40, endsAt: 'outlet' });
  });

  it('names no CRS for a place in that of the terrain', async () => {
    const { engine, asked } = engineWith({
      'spill-path': { type: 'FeatureCollection', features: [leg(1, 1, 1, 0, 'no-way')] },
    });
    const session = new Session(async () => engine);
    await surveyTerrain(session, { terrain: ['x.tif'] }, ['x.tif']);
    await tracePath(session, '1,2');
    expect(asked[1]).toEqual(['spill-path', { terrain: ['x.tif'], from: '1,2' }]);
    expect(session.state.path?.endsAt).toBe('no-way');
  });

  it('says that a dismissed question was cancelled, and that nothing is lost', async () => {
    const engine = {
      run: () => new JobQueue().add('path', () => new Promise(() => {})),
    } as unknown as Engine;
    const session = new Session(async () => engine);
    const asked = tracePath(session, '1,2');
    await new Promise((next) => setTimeout(next));
    session.running.dismiss('path');
    await asked;
    expect(session.state.faults).toEqual([]);
    expect(session.state.said).toBe(
      'Tracing the spill path was cancelled. What was there before is still there.',
    );
  });
});
