import { type Drainage, nowhere, outside } from './drainage.ts';
import type { Survey } from './survey.ts';
import { UnionFind } from './union-find.ts';

/**
 * The hierarchy of depressions, struct of arrays with one value a node. Nodes 0…leaves−1 are the leaves, the ones
 * after them were born where depressions meet. A node whose pit lies below its spill elevation is a pond; others
 * are flats or stand for nothing.
 */
export interface Depressions {
  readonly leaves: number;
  /** The depression that holds it, −1 = none. */
  readonly parent: Int32Array;
  /** Leaf of the lowest pit. */
  readonly pitLeaf: Int32Array;
  readonly pitElevationM: Float32Array;
  /** Spill elevation; +∞ where no outlet can be reached. */
  readonly spillElevationM: Float32Array;
  /** The tree's sill that is the pour point: where the brimful pond first touches what it spills into. */
  readonly pourSill: Int32Array;
  /** The tree's sill over which the overflow leaves the flats beside the pour point. */
  readonly leavingSill: Int32Array;
  /** The leaf beyond that sill, `outside` (−1) at an outlet, `nowhere` (−2) without one. */
  readonly intoLeaf: Int32Array;
  /** 1 for a pond: ground lower than its spill elevation, with an outlet further on. */
  readonly isPond: Uint8Array;
}

const none = -1;

/**
 * Builds the hierarchy by going through the tree's sills, lowest first (Kruskal 1956; depression hierarchy of
 * Barnes, Callaghan & Wickert 2020), so that ties do not depend on order:
 * two sets meet at a sill and a depression is born there, parent of both; one that was itself born at that
 * elevation takes the other in; a set whose pit lies at that elevation is a flat and is taken in by the other; a
 * depression that drains at the elevation at which it was born is given up and its children have no parent.
 */
export function depressionsOf(survey: Survey, drainage: Drainage): Depressions {
  const { leaves } = survey;
  const { tree } = drainage;
  const most = leaves + tree.elevationM.length;
  const parent = new Int32Array(most).fill(none);
  const alias = new Int32Array(most).fill(none);
  const givenUp = new Uint8Array(most);
  const bornM = new Float32Array(most);
  bornM.set(survey.pitElevationM);
  const pitLeaf = new Int32Array(most);
  for (let leaf = 0; leaf < leaves; leaf++) pitLeaf[leaf] = leaf;
  const spillElevationM = new Float32Array(most).fill(Number.POSITIVE_INFINITY);
  const leavingSill = new Int32Array(most).fill(none);
  const flatSill = new Int32Array(most).fill(none);
  const intoLeaf = new Int32Array(most).fill(nowhere);
  const sets = new UnionFind(leaves + 1);
  const nodeOfSet = new Int32Array(leaves + 1);
  for (let leaf = 0; leaf < leaves; leaf++) nodeOfSet[leaf] = leaf;
  nodeOfSet[leaves] = none;
  let count = leaves;

  const isLower = (a: number, b: number): boolean =>
    survey.pitElevationM[a] < survey.pitElevationM[b] ||
    (survey.pitElevationM[a] === survey.pitElevationM[b] && a < b);
  const spills = (node: number, sill: number, into: number): void => {
    spillElevationM[node] = tree.elevationM[sill];
    leavingSill[node] = sill;
    const beyond =
      node === nodeOfSet[sets.root(tree.sillLeaf[sill])] ? tree.otherLeaf[sill] : tree.sillLeaf[sill];
    intoLeaf[node] = beyond === leaves ? outside : beyond;
    parent[node] = into;
    if (into !== none && isLower(pitLeaf[node], pitLeaf[into])) pitLeaf[into] = pitLeaf[node];
  };
  const takeInFlat = (flat: number, sill: number, into: number): void => {
    const held = flatSill[into];
    if (held === none || tree.elevationM[held] !== tree.elevationM[sill]) flatSill[into] = sill;
    spillElevationM[flat] = tree.elevationM[sill];
    leavingSill[flat] = sill;
    parent[flat] = into;
  };

  for (let sill = 0; sill < tree.elevationM.length; sill++) {
    const at = tree.elevationM[sill];
    const rootA = sets.root(tree.sillLeaf[sill]);
    const rootB = sets.root(tree.otherLeaf[sill]);
    const a = nodeOfSet[rootA];
    const b = nodeOfSet[rootB];
    let whole: number;
    if (a === none || b === none) {
      const node = a === none ? b : a;
      whole = none;
      spills(node, sill, none);
      if (node >= leaves && bornM[node] === at) givenUp[node] = 1;
    } else if (a < leaves && bornM[a] === at && (b >= leaves || bornM[b] !== at || b < a)) {
      whole = b;
      takeInFlat(a, sill, b);
    } else if (b < leaves && bornM[b] === at) {
      whole = a;
      takeInFlat(b, sill, a);
    } else if (bornM[a] === at && bornM[b] === at) {
      whole = a;
      alias[b] = a;
      if (isLower(pitLeaf[b], pitLeaf[a])) pitLeaf[a] = pitLeaf[b];
    } else if (bornM[a] === at) {
      whole = a;
      spills(b, sill, a);
    } else if (bornM[b] === at) {
      whole = b;
      spills(a, sill, b);
    } else {
      whole = count++;
      bornM[whole] = at;
      pitLeaf[whole] = pitLeaf[a];
      spills(a, sill, whole);
      spills(b, sill, whole);
    }
    nodeOfSet[sets.join(rootA, rootB)] = whole;
  }

  for (let node = 0; node < count; node++) {
    let up = parent[node];
    while (up !== none && alias[up] !== none) up = alias[up];
    parent[node] = up !== none && givenUp[up] === 1 ? none : up;
  }
  const pitElevationM = new Float32Array(count);
  const isPond = new Uint8Array(count);
  const pourSill = new Int32Array(count);
  for (let node = 0; node < count; node++) {
    pitElevationM[node] = survey.pitElevationM[pitLeaf[node]];
    const flat = flatSill[node];
    pourSill[node] =
      flat !== none && tree.elevationM[flat] === spillElevationM[node] ? flat : leavingSill[node];
    const stands = alias[node] === none && givenUp[node] === 0;
    isPond[node] = stands && pitElevationM[node] < spillElevationM[node] ? 1 : 0;
  }
  const depressions: Depressions = {
    leaves,
    parent: parent.slice(0, count),
    pitLeaf: pitLeaf.slice(0, count),
    pitElevationM,
    spillElevationM: spillElevationM.slice(0, count),
    pourSill,
    leavingSill: leavingSill.slice(0, count),
    intoLeaf: intoLeaf.slice(0, count),
    isPond,
  };
  settleOutermost(depressions, drainage);
  return depressions;
}

/**
 * Outermost ponds overflow along the rooted tree (a given-up parent may have let them meet over another sill of
 * the same elevation); ponds in ground without any way to an outlet have no spill elevation and are none.
 */
function settleOutermost(depressions: Depressions, drainage: Drainage): void {
  const { leaves, parent, pitElevationM, spillElevationM, pourSill, leavingSill, intoLeaf, isPond } =
    depressions;
  const outermost = outermostOf(parent);
  const { towards, levelM, sill } = drainage;
  const wetIn = (leaf: number): number => {
    const node = outermost[leaf];
    return pitElevationM[leaf] < levelM[leaf] && isPond[node] === 1 ? node : none;
  };
  for (let leaf = 0; leaf < leaves; leaf++) {
    const node = wetIn(leaf);
    if (node === none || towards[leaf] === nowhere) continue;
    if (towards[leaf] >= 0 && wetIn(towards[leaf]) === node) continue;
    pourSill[node] = sill[leaf];
    leavingSill[node] = sill[leaf];
    intoLeaf[node] = towards[leaf];
  }
  for (let node = 0; node < isPond.length; node++) {
    if (spillElevationM[outermost[node]] === Number.POSITIVE_INFINITY) isPond[node] = 0;
  }
}

/** For each node the outermost one that holds it, itself included. */
export function outermostOf(parent: Int32Array): Int32Array {
  const outermost = new Int32Array(parent.length).fill(none);
  const way: number[] = [];
  for (let node = 0; node < parent.length; node++) {
    let at = node;
    while (outermost[at] === none && parent[at] !== none) {
      way.push(at);
      at = parent[at];
    }
    const top = outermost[at] === none ? at : outermost[at];
    outermost[at] = top;
    for (let back = way.pop(); back !== undefined; back = way.pop()) outermost[back] = top;
  }
  return outermost;
}
