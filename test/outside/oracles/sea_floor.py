"""The water level at which basins of the sea floor drown, from the deepest cell of the ocean, as JSON.

    /usr/bin/python3 test/outside/oracles/sea_floor.py

Common practice, no source: a coarse grid closes a narrow strait. NOAA ETOPO grids of 1 degree and 20 minutes, joined
at 180 degrees of longitude. Each basin is looked at in its deepest cell within a box of longitude and latitude.
Levels by image morphology and by a spanning tree must be equal to the last bit.
"""

import json
import sys

import numpy
import scipy
import skimage
from brim_by_reconstruction import brim_by_reconstruction
from brim_by_spanning_tree import brim_by_spanning_tree
from terrains import rasterio, terrains

boxes = {
    # west, east, south, north
    "Mediterranean": (15, 30, 32, 39),
    "Gulf of Mexico": (-96, -84, 22, 28),
    "North Atlantic west basin": (-75, -55, 22, 38),
    "Arctic": (-160, -130, 74, 82),
    "Sea of Japan": (131, 139, 38, 43),
}


def drowning_levels(terrain):
    level = brim_by_reconstruction(terrain)
    if not numpy.array_equal(level, brim_by_spanning_tree(terrain)):
        sys.exit(f"{terrain.name}, {terrain.neighbours} neighbours: levels differ between the two libraries.")
    rows, columns = numpy.indices(level.shape)
    lon, lat = terrain.transform * (columns + 0.5, rows + 0.5)
    basins = {}
    for name, (west, east, south, north) in boxes.items():
        inside = (lon > west) & (lon < east) & (lat > south) & (lat < north)
        cell = int(numpy.where(inside, terrain.z, numpy.inf).argmin())
        basins[name] = {
            "cell": cell,
            "longitudeDeg": round(float(lon.flat[cell]), 6),
            "latitudeDeg": round(float(lat.flat[cell]), 6),
            "elevationM": float(terrain.z.flat[cell]),
            "levelM": float(level.flat[cell]),
        }
    return {"deepestCell": int(terrain.outlets[0]), "deepestM": float(terrain.z.min()), "basins": basins}


if __name__ == "__main__":
    grids = {
        f"{name}-{neighbours}": drowning_levels(terrains[name](neighbours))
        for name in ("etopo60", "etopo20")
        for neighbours in (8, 4)
    }
    libraries = {
        "scikit-image": skimage.__version__,
        "scipy": scipy.__version__,
        "numpy": numpy.__version__,
        "rasterio": rasterio.__version__,
    }
    print(json.dumps({"script": "test/outside/oracles/sea_floor.py", "libraries": libraries, "grids": grids}, indent=1))
