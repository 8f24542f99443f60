"""Brim levels by grey-scale morphological reconstruction by erosion (Vincent 1993, IEEE Trans. Image Processing 2(2))."""

import numpy
from skimage.morphology import reconstruction


def brim_by_reconstruction(terrain):
    """Level of each cell, float32. Seed: elevation at the outlets, the maximum elsewhere; mask: elevation."""
    z = terrain.z.astype(numpy.float64)
    footprint = numpy.ones((3, 3), bool)
    if terrain.neighbours == 4:
        footprint[::2, ::2] = False
    level = numpy.full(z.shape, z.max())
    level.flat[terrain.outlets] = z.flat[terrain.outlets]
    if not terrain.wraps:
        return reconstruction(level, z, "erosion", footprint).astype(numpy.float32)
    # Each pass sees the columns across the seam as they stand; when none changes any more, the seam is closed.
    while True:
        beside = [numpy.hstack([grid[:, -1:], grid, grid[:, :1]]) for grid in (level, z)]
        lower = reconstruction(*beside, "erosion", footprint)[:, 1:-1]
        if numpy.array_equal(lower, level):
            return level.astype(numpy.float32)
        level = lower
