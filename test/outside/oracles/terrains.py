"""The terrains that the oracles look at: elevation, neighbourhood, seam, outlet cells, cell areas."""

import json
from dataclasses import dataclass
from pathlib import Path

import numpy
import rasterio

root = Path(__file__).resolve().parents[3]


@dataclass(frozen=True)
class Terrain:
    name: str
    z: numpy.ndarray
    """float32, height x width, metres, without voids."""
    neighbours: int
    wraps: bool
    outlets: numpy.ndarray
    """Row-major indices of the cells at which water leaves at ground level."""
    cell_area: object
    """Square metres, None on a geographic grid."""
    transform: object
    """Affine from (column, row) to (x, y), None without one."""


def elevation_file(name):
    with rasterio.open(root / "test" / "data" / name) as file:
        z = file.read(1)
        assert z.dtype == numpy.float32 and numpy.isfinite(z).all()
        return z + numpy.float32(0), file.transform  # -0 becomes 0


def rim_cells(z):
    rim = numpy.ones(z.shape, bool)
    rim[1:-1, 1:-1] = False
    return numpy.flatnonzero(rim)


def olinda(neighbours):
    z, transform = elevation_file("olinda_dem_utm25s.tif")
    area = transform.a * -transform.e
    return Terrain("olinda", z, neighbours, False, rim_cells(z), area, transform)


def volcano(neighbours):
    text = (root / "node_modules" / "vega-datasets" / "data" / "volcano.json").read_text()
    relief = json.loads(text)
    z = numpy.array(relief["values"], numpy.float32).reshape(relief["height"], relief["width"])
    return Terrain("volcano", z, neighbours, False, rim_cells(z), 100.0, None)


def globe(name):
    def terrain(neighbours):
        z, transform = elevation_file(f"{name}.tif")
        return Terrain(name, z, neighbours, True, numpy.array([z.argmin()]), None, transform)

    return terrain


terrains = {"olinda": olinda, "volcano": volcano, "etopo60": globe("etopo60"), "etopo20": globe("etopo20")}
