"""The connected pieces of wet ground, that is {level > z}, by image labelling."""

import numpy
from scipy.ndimage import label
from scipy.sparse import coo_matrix
from scipy.sparse.csgraph import connected_components


def wet_pieces(terrain, level):
    """Number of pieces, and each cell's piece (from 0 on, by the piece's first cell; -1 = dry), height x width."""
    structure = numpy.ones((3, 3), int)
    if terrain.neighbours == 4:
        structure[::2, ::2] = 0
    labels, count = label(level > terrain.z, structure)
    if terrain.wraps:
        labels = joined_across_the_seam(labels, count, terrain.neighbours)
    wet = numpy.flatnonzero(labels)
    _, first, piece = numpy.unique(labels.flat[wet], return_index=True, return_inverse=True)
    position = numpy.empty(first.size, int)
    position[numpy.argsort(first)] = numpy.arange(first.size)
    pieces = numpy.full(labels.size, -1)
    pieces[wet] = position[piece.ravel()]
    return first.size, pieces.reshape(labels.shape)


def joined_across_the_seam(labels, count, neighbours):
    """The same labels, one for each set that meets across the seam; 0 stays dry."""
    west, east = labels[:, 0], labels[:, -1]
    pairs = [(west, east)]
    if neighbours == 8:
        pairs += [(west[1:], east[:-1]), (west[:-1], east[1:])]
    a, b = (numpy.concatenate(side) for side in zip(*pairs))
    both = (a > 0) & (b > 0)
    graph = coo_matrix((numpy.ones(both.sum()), (a[both], b[both])), shape=(count + 1,) * 2)
    joined = connected_components(graph, directed=False)[1]
    return numpy.where(labels > 0, joined[labels] + 1, 0)
