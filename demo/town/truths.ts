import { basin, basinCapacityM3 } from './basin.ts';
import { quantised } from './elevation.ts';
import { levee } from './levee.ts';
import { plan, railway, railwayCrest, railwayY, riverBed, riverY, underpass } from './plan.ts';
import { quarryPonds } from './quarry.ts';

/** What is known of the town from how it was drawn: places as cells, elevations and volumes exact. */
export function townTruths() {
  return {
    name: plan.name,
    note: 'An invented town in open ocean. Everything below follows from its drawing, nothing from an analysis.',
    seed: plan.seed,
    grid: {
      columns: plan.size,
      rows: plan.size,
      cellM: 1,
      west: plan.west,
      north: plan.north,
      epsg: plan.epsg,
      verticalEpsg: plan.verticalEpsg,
      verticalUnit: 'm',
    },
    quarry: { ponds: quarryPonds() },
    levee: {
      crestM: levee.crest,
      lowPlace: {
        elevationM: levee.lowCrest,
        columns: [levee.lowX - levee.lowHalfWidth, levee.lowX + levee.lowHalfWidth - 1],
        ...cellAt(levee.lowX, riverY(levee.lowX) - levee.offRiver),
      },
    },
    basin: {
      floorM: basin.floor,
      crestM: basin.crest,
      weirM: basin.weir,
      capacityM3: basinCapacityM3(),
      depthM: basin.weir - basin.floor,
      weirCell: cellAt(basin.weirX + basin.weirWidth / 2, basin.y + basin.height + 12),
      floor: { column: basin.x, row: basin.y, columns: basin.width, rows: basin.height },
    },
    underpass: { bottomM: underpass.bottom, ...cellAt(underpass.x, railwayY(underpass.x)) },
    embankment: {
      lowestCrestM: quantised(Math.min(railwayCrest(railway.dipX - 0.5), railwayCrest(railway.dipX + 0.5))),
      ...cellAt(railway.dipX, railwayY(railway.dipX)),
    },
    river: {
      inflow: { ...cellAt(0, riverY(0)), bedM: quantised(riverBed(0.5)) },
      outflow: {
        ...cellAt(plan.size - 1, riverY(plan.size - 1)),
        bedM: quantised(riverBed(plan.size - 0.5)),
      },
    },
  };
}

function cellAt(x: number, y: number) {
  return { column: Math.floor(x), row: Math.floor(y) };
}
