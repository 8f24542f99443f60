/** Disjoint sets of 0…count−1 with path halving and union by size. The root of a set is any of its members. */
export class UnionFind {
  readonly #up: Int32Array;

  constructor(count: number) {
    this.#up = new Int32Array(count).fill(-1);
  }

  root(member: number): number {
    const up = this.#up;
    let at = member;
    for (let next = up[at]; next >= 0; next = up[at]) {
      const beyond = up[next];
      if (beyond < 0) return next;
      up[at] = beyond;
      at = beyond;
    }
    return at;
  }

  /** Joins two sets by their roots and returns the root of the whole. */
  join(rootA: number, rootB: number): number {
    const up = this.#up;
    if (rootA === rootB) return rootA;
    const [large, small] = up[rootA] <= up[rootB] ? [rootA, rootB] : [rootB, rootA];
    up[large] += up[small];
    up[small] = large;
    return large;
  }
}
