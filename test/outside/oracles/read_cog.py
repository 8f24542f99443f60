"""Reads GeoTIFF files with an independent raster library (rasterio) and prints what it finds as JSON.

    /usr/bin/python3 test/outside/oracles/read_cog.py FILE...

Each file: `sha256` of the samples (little-endian, row-major, NaN as 0x7fc00000), shape, sample type, `transform`
as [cell width, 0, west, 0, -cell height, north], `epsg` (null if user-defined or with a vertical CRS), `crs` as WKT,
`noData`, `overviews` (reduction factors), `tile` [rows, columns], `isTiled`, compression, predictor, band tags, `unit`.
"""

import hashlib
import json
import sys

import numpy
import rasterio


def sha256_of(samples):
    if samples.dtype == numpy.float32:
        words = samples.view(numpy.uint32).copy()
        words[numpy.isnan(samples)] = 0x7FC00000
        samples = words
    return hashlib.sha256(samples.astype(samples.dtype.newbyteorder("<")).tobytes()).hexdigest()


def told(value):
    if value is None or value == value:
        return value
    return "nan"


def described(path):
    with rasterio.open(path) as file:
        samples = file.read(1)
        overview_hashes = []
        for level in range(len(file.overviews(1))):
            with rasterio.open(path, overview_level=level) as overview:
                overview_hashes.append(sha256_of(overview.read(1)))
        structure = file.tags(ns="IMAGE_STRUCTURE")
        return {
            "width": file.width,
            "height": file.height,
            "bands": file.count,
            "type": file.dtypes[0],
            "sha256": sha256_of(samples),
            "transform": list(file.transform)[:6],
            "epsg": file.crs.to_epsg() if file.crs else None,
            "crs": file.crs.to_wkt() if file.crs else None,
            "noData": told(file.nodata),
            "overviews": file.overviews(1),
            "overviewSha256": overview_hashes,
            "tile": list(file.block_shapes[0]),
            "isTiled": bool(file.is_tiled),
            "compression": structure.get("COMPRESSION"),
            "predictor": structure.get("PREDICTOR"),
            "layout": structure.get("LAYOUT"),
            "areaOrPoint": file.tags().get("AREA_OR_POINT"),
            "bandTags": file.tags(1),
            "description": file.descriptions[0],
            "unit": file.units[0],
        }


if __name__ == "__main__":
    if len(sys.argv) < 2:
        sys.exit("No file was named; name at least one GeoTIFF.")
    library = f"rasterio {rasterio.__version__}, GDAL {rasterio.__gdal_version__}"
    print(json.dumps({"library": library, "files": {path: described(path) for path in sys.argv[1:]}}, indent=1))
