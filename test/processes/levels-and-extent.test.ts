import { describe, expect, it } from 'vitest';
import { pondsOf } from './found-ponds.ts';

/** A bowl of 1 m in ground at 5 m, with a dry channel to the rim at 3 m. Cells of 10 m. */
const bowl = [
  [5, 5, 5, 5, 5],
  [5, 2, 5, 5, 5],
  [5, 5, 3, 5, 5],
  [5, 5, 5, 3, 5],
  [5, 5, 5, 5, 3],
];

describe('levels of outlets', () => {
  it('hold water at the level beyond the edge', async () => {
    const dry = await pondsOf(bowl);
    expect(dry.ponds.features.map(({ properties }) => properties?.spillElevationM)).toEqual([3]);
    const { ponds, summary, notes } = await pondsOf(bowl, { inputs: { edgeLevel: 4 } });
    // 3 cells of the channel, the one on the rim among them, and the pit stand under 4 m of water level.
    expect(ponds.features.map(({ properties }) => properties)).toMatchObject([
      { spillElevationM: 4, areaM2: 400, capacityM3: 500, heldByOutlet: true },
    ]);
    expect(summary).toMatchObject({ outermostPonds: 1, capacityM3: 500 });
    expect(notes.join(' ')).toMatch(/1 outermost ponds? stands? at the level of water outside/);
  });

  it('hold water at the level of a named outlet, where it names none of its own', async () => {
    const inputs = { edges: 'closed', outlets: ['500015,985'], outletLevel: 4.5 };
    const { ponds } = await pondsOf(bowl, { inputs });
    expect(ponds.features.map(({ properties }) => properties)).toMatchObject([
      { spillElevationM: 4.5, capacityM3: 100 * (2.5 + 1.5 * 3), heldByOutlet: true },
    ]);
  });

  it('hold water at the level in voids', async () => {
    const holed = bowl.map((row) => [...row]);
    holed[4][4] = Number.NaN;
    const { ponds } = await pondsOf(holed, { inputs: { edges: 'closed', voids: 'all', voidLevel: 3.5 } });
    expect(ponds.features.map(({ properties }) => properties)).toMatchObject([
      { spillElevationM: 3.5, capacityM3: 100 * (1.5 + 0.5 + 0.5) },
    ]);
  });
});

describe('a part of the terrain', () => {
  it('is analysed alone, and water leaves at its edge', async () => {
    const { summary } = await pondsOf(bowl, { inputs: { extent: '500000,960,500030,1000' } });
    expect(summary).toMatchObject({ width: 3, height: 4, outermostPonds: 1 });
  });

  it('is refused with what was expected when it is no extent', async () => {
    await expect(pondsOf(bowl, { inputs: { extent: '3,2,1' } })).rejects.toMatchObject({
      code: 'bad-input',
      message:
        'The input "extent" is "3,2,1"; expected four numbers west,south,east,north with west below east and south below north.',
    });
  });

  it('is refused when a budget asks for an overview that the file has not', async () => {
    await expect(pondsOf(bowl, { inputs: { cellBudget: 4 } })).rejects.toMatchObject({ code: 'bad-input' });
  });
});
