"""Brim levels, capacity and outermost ponds of a real terrain by general-purpose libraries, as JSON.

    /usr/bin/python3 test/outside/oracles/brim_levels.py olinda|volcano|etopo60 8|4

Levels are worked out twice, by image morphology and by a sparse graph, and must be equal to the last bit.
`levelSha256`: of the levels as little-endian float32, row-major. `sample`: [cell, level] of cells spread evenly.
`ponds`: the connected pieces of {level > z}; `sha256` over (first cell, cells, level) of each as little-endian
float64, by first cell; `largest`: at most 50, most cells first. Depth sums are metres times cells, correctly rounded.
"""

import hashlib
import json
import math
import sys

import numpy
import scipy
import skimage
from brim_by_reconstruction import brim_by_reconstruction
from brim_by_spanning_tree import brim_by_spanning_tree
from terrains import rasterio, terrains
from wet_pieces import wet_pieces


def described(terrain):
    level = brim_by_reconstruction(terrain)
    other = brim_by_spanning_tree(terrain)
    differing = numpy.flatnonzero(level != other)
    if differing.size:
        at = differing[0]
        sys.exit(
            f"{terrain.name}: {differing.size} levels differ between the two libraries, the first at cell {at}: "
            f"{level.flat[at]} by morphology, {other.flat[at]} by the spanning tree."
        )
    count, pieces = wet_pieces(terrain, level)
    z64 = terrain.z.astype(numpy.float64)
    depth = level.astype(numpy.float64) - z64
    row_sums = [math.fsum(row) for row in depth]
    ponds = measured(terrain, level, depth, count, pieces)
    packed = numpy.array([[p["firstCell"], p["cells"], p["levelM"]] for p in ponds], "<f8")
    area = terrain.cell_area
    spread = [(k * level.size) // 200 for k in range(200)]
    return {
        "script": "test/outside/oracles/brim_levels.py",
        "libraries": {
            "scikit-image": skimage.__version__,
            "scipy": scipy.__version__,
            "numpy": numpy.__version__,
            "rasterio": rasterio.__version__,
        },
        "terrain": terrain.name,
        "width": level.shape[1],
        "height": level.shape[0],
        "neighbours": terrain.neighbours,
        "wraps": terrain.wraps,
        "outlets": "rim" if terrain.outlets.size > 1 else int(terrain.outlets[0]),
        "cellAreaM2": area,
        "levelSha256": hashlib.sha256(level.astype("<f4").tobytes()).hexdigest(),
        "wetCells": int((depth > 0).sum()),
        "depthSumM": math.fsum(depth.flat),
        "capacityM3": None if area is None else math.fsum((depth * area).flat),
        "rowDepthSumsM": row_sums if area is None else None,
        "ponds": {
            "count": count,
            "sha256": hashlib.sha256(packed.tobytes()).hexdigest(),
            "largest": sorted(ponds, key=lambda p: (-p["cells"], p["firstCell"]))[:50],
        },
        "sample": [[cell, float(level.flat[cell])] for cell in spread],
    }


def measured(terrain, level, depth, count, pieces):
    order = numpy.argsort(pieces, axis=None, kind="stable")
    starts = numpy.searchsorted(pieces.flat[order], numpy.arange(count + 1))
    found = []
    for piece in range(count):
        cells = order[starts[piece] : starts[piece + 1]]
        levels = numpy.unique(level.flat[cells])
        assert levels.size == 1
        pond = {
            "firstCell": int(cells[0]),
            "cells": int(cells.size),
            "levelM": float(levels[0]),
            "pitM": float(terrain.z.flat[cells].min()),
            "depthSumM": math.fsum(depth.flat[cells]),
        }
        if terrain.cell_area is not None:
            pond["capacityM3"] = math.fsum(depth.flat[cells] * terrain.cell_area)
        found.append(pond)
    return found


if __name__ == "__main__":
    if len(sys.argv) != 3 or sys.argv[1] not in terrains or sys.argv[2] not in ("4", "8"):
        sys.exit(f"Name a terrain ({', '.join(terrains)}) and 4 or 8 neighbours.")
    print(json.dumps(described(terrains[sys.argv[1]](int(sys.argv[2]))), indent=1))
