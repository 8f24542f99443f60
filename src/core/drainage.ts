import { emptySills, type Sills, setSill, spanningForest } from './forest.ts';
import type { Survey } from './survey.ts';

/** Instead of a leaf: the outside. */
export const outside = -1;
/** Instead of a leaf: no way to any outlet. */
export const nowhere = -2;

/**
 * Where the water of a brimful terrain goes, one value a leaf. The spanning tree of sills, rooted at the outside,
 * holds for each leaf the way of least highest sill to an outlet (Hu 1961; as a drainage graph Cordonnier, Bovy &
 * Braun 2019).
 */
export interface Drainage {
  /** The tree's sills, lowest first; leaf `survey.leaves` is the outside. */
  readonly tree: Sills;
  /** Brim level: the highest sill on the way; +∞ without a way. */
  readonly levelM: Float32Array;
  /** The leaf it runs into, `outside` or `nowhere`. */
  readonly towards: Int32Array;
  /** The tree's sill that it runs over, −1 without. */
  readonly sill: Int32Array;
  /** Leaves with a way, each after the one it runs into. */
  readonly order: Int32Array;
}

/** Roots the forest of a survey, joined with the edges of outlets, at the outside. */
export function drainageOf(survey: Survey, outlets: Sills): Drainage {
  const tree = treeOf(survey, outlets);
  const { leaves } = survey;
  const { starts, sills } = sillsAt(tree, leaves + 1);
  const levelM = new Float32Array(leaves).fill(Number.POSITIVE_INFINITY);
  const towards = new Int32Array(leaves).fill(nowhere);
  const sill = new Int32Array(leaves).fill(-1);
  const order = new Int32Array(leaves);
  let found = 0;
  const visit = (from: number, level: number): void => {
    for (let k = starts[from]; k < starts[from + 1]; k++) {
      const s = sills[k];
      const leaf = tree.sillLeaf[s] === from ? tree.otherLeaf[s] : tree.sillLeaf[s];
      if (leaf === leaves || towards[leaf] !== nowhere) continue;
      levelM[leaf] = Math.max(level, tree.elevationM[s]);
      towards[leaf] = from === leaves ? outside : from;
      sill[leaf] = s;
      order[found++] = leaf;
    }
  };
  visit(leaves, Number.NEGATIVE_INFINITY);
  for (let next = 0; next < found; next++) visit(order[next], levelM[order[next]]);
  return { tree, levelM, towards, sill, order: order.slice(0, found) };
}

function treeOf(survey: Survey, outlets: Sills): Sills {
  const inner = survey.elevationM.length;
  const count = inner + outlets.elevationM.length;
  const all = emptySills(count);
  for (const name of ['elevationM', 'sillCell', 'otherCell', 'sillLeaf', 'otherLeaf'] as const) {
    all[name].set(survey[name]);
    all[name].set(outlets[name], inner);
  }
  const kept = spanningForest(survey.leaves + 1, all);
  const tree = emptySills(kept.length);
  kept.forEach((at, i) => {
    const { elevationM, sillCell, otherCell, sillLeaf, otherLeaf } = all;
    setSill(tree, i, elevationM[at], sillCell[at], otherCell[at], sillLeaf[at], otherLeaf[at]);
  });
  return tree;
}

/** The sills of each leaf: those of leaf l are `sills[starts[l]]` to `sills[starts[l + 1] − 1]`. */
function sillsAt(tree: Sills, leaves: number): { starts: Int32Array; sills: Int32Array } {
  const starts = new Int32Array(leaves + 1);
  for (const ends of [tree.sillLeaf, tree.otherLeaf]) for (const leaf of ends) starts[leaf + 1]++;
  for (let l = 0; l < leaves; l++) starts[l + 1] += starts[l];
  const next = starts.slice(0, leaves);
  const sills = new Int32Array(starts[leaves]);
  for (let s = 0; s < tree.sillLeaf.length; s++) {
    sills[next[tree.sillLeaf[s]]++] = s;
    sills[next[tree.otherLeaf[s]]++] = s;
  }
  return { starts, sills };
}
