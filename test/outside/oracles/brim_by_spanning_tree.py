"""Brim levels by the minimum spanning tree of the grid graph (Hu 1961, Operations Research 9(6): the lowest highest
edge between two nodes lies on the tree's path)."""

import numpy
from scipy.sparse import coo_matrix
from scipy.sparse.csgraph import breadth_first_order, minimum_spanning_tree


def touching_pairs(terrain):
    """Each pair of touching cells once, as two arrays of row-major indices."""
    index = numpy.arange(terrain.z.size).reshape(terrain.z.shape)
    steps = [(0, 1), (1, 0)] + ([(1, 1), (1, -1)] if terrain.neighbours == 8 else [])
    pairs = []
    for down, right in steps:
        beyond = numpy.roll(index, (-down, -right), (0, 1))
        valid = numpy.ones(index.shape, bool)
        if down:
            valid[-1] = False
        if right and not terrain.wraps:
            valid[:, -1 if right == 1 else 0] = False
        pairs.append((index[valid], beyond[valid]))
    return [numpy.concatenate(ends) for ends in zip(*pairs)]


def brim_by_spanning_tree(terrain):
    """Level of each cell, float32. Edges weigh max(z, z); one more node, outside, is joined to the outlet cells."""
    z = terrain.z.ravel()
    u, v = touching_pairs(terrain)
    outside = z.size
    u = numpy.concatenate([u, terrain.outlets])
    v = numpy.concatenate([v, numpy.full(terrain.outlets.size, outside)])
    heights, rank = numpy.unique(z, return_inverse=True)
    rank = numpy.append(rank.ravel(), 0)
    # Ranks from 1 on weigh as the elevations do; a sparse graph drops edges of weight zero.
    weight = numpy.maximum(rank[u], rank[v]) + 1
    tree = minimum_spanning_tree(coo_matrix((weight, (u, v)), shape=(outside + 1,) * 2).tocsr())
    tree = tree + tree.T
    order, before = breadth_first_order(tree, outside, directed=False)
    assert order.size == outside + 1
    entries = tree.tocoo()
    towards = before[entries.row] == entries.col
    sill = numpy.zeros(outside + 1, numpy.int64)
    sill[entries.row[towards]] = entries.data[towards].astype(numpy.int64) - 1
    level = sill.tolist()
    before = before.tolist()
    for node in order[1:].tolist():
        if before[node] != outside:
            level[node] = max(level[node], level[before[node]])
    return heights[numpy.array(level[:-1])].reshape(terrain.z.shape)
