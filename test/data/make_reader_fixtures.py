"""Small elevation files and published coordinates for the reading tests, made with rasterio (Debian python3-rasterio).

Run: /usr/bin/python3 test/data/make_reader_fixtures.py
Writes test/data/reader/*.tif and test/data/reader/expected.json. The values are a formula's, read back by the library.
"""
import json
import os
import numpy as np
import rasterio
from rasterio.transform import from_origin
from rasterio.warp import transform

HERE = os.path.join(os.path.dirname(os.path.abspath(__file__)), 'reader')
WIDTH, HEIGHT = 37, 29


def values(dtype):
    row, column = np.mgrid[0:HEIGHT, 0:WIDTH]
    if np.dtype(dtype).kind == 'f':
        return (np.sin(row * 0.7) * 50 + column * 1.25 - 20).astype(dtype)
    low = 0 if np.dtype(dtype).kind == 'u' else -60
    return ((row * 7 + column * 3) % 120 + low).astype(dtype)


def write(name, dtype, crs='EPSG:32631', place=from_origin(500000, 5600000, 2, 2), **options):
    data = values(dtype)
    path = os.path.join(HERE, name + '.tif')
    with rasterio.open(path, 'w', driver='GTiff', width=WIDTH, height=HEIGHT, count=1, dtype=dtype,
                       crs=crs, transform=place, **options) as file:
        file.write(data, 1)
    with rasterio.open(path) as file:
        return {'values': [float(v) for v in file.read(1).ravel()],
                'west': file.transform.c, 'north': file.transform.f,
                'cellWidth': file.transform.a, 'cellHeight': -file.transform.e}


os.makedirs(HERE, exist_ok=True)
files = {}
for dtype in ['uint8', 'uint16', 'uint32', 'int8', 'int16', 'int32', 'float32', 'float64']:
    files[f'strips-{dtype}'] = write(f'strips-{dtype}', dtype, blockysize=8)
for dtype, predictor in [('uint8', 2), ('uint16', 2), ('int16', 2), ('int32', 2), ('float32', 2), ('float32', 3),
                         ('float64', 3)]:
    # Seen here: the library swaps bytes before the floating-point predictor when it writes big-endian files, so that
    # other numbers come back than were written, some beyond float32. Such files are no fixtures.
    for order in ['LITTLE'] if predictor == 3 else ['LITTLE', 'BIG']:
        name = f'tiles-{dtype}-predictor{predictor}-{order.lower()}'
        files[name] = write(name, dtype, tiled=True, blockxsize=16, blockysize=16, compress='deflate',
                            predictor=predictor, ENDIANNESS=order)
for method in ['lzw', 'packbits', 'zstd']:
    files[f'{method}'] = write(method, 'int16', compress=method, blockysize=8)
    files[f'{method}-tiles'] = write(f'{method}-tiles', 'float32', compress=method, tiled=True, blockxsize=32, blockysize=16)
files['lzw-predictor'] = write('lzw-predictor', 'float32', compress='lzw', predictor=3, blockysize=8)
files['big-endian-float64'] = write('big-endian-float64', 'float64', compress='lzw', ENDIANNESS='BIG', blockysize=8)
files['big-tiff'] = write('big-tiff', 'float32', BIGTIFF='YES', compress='deflate', blockysize=8)
files['big-tiff-big-endian'] = write('big-tiff-big-endian', 'int32', BIGTIFF='YES', ENDIANNESS='BIG', blockysize=8)
files['float16'] = write('float16', 'float32', NBITS=16, blockysize=8)
feet = ('+proj=lcc +lat_1=41.03333333333333 +lat_2=40.66666666666666 +lat_0=40.16666666666666 +lon_0=-74 '
        '+x_0=300000.0000000001 +y_0=0 +ellps=GRS80 +units=us-ft +no_defs')
files['user-defined-feet'] = write('user-defined-feet', 'float32', crs=feet, place=from_origin(984250, 200000, 10, 10))

points = {}
for code, lon, lat in [(32631, 3.5, 50.25), (2263, -73.9, 40.75), (3035, 5, 50), (3031, 120, -75), (3413, -30, 80),
                       (5070, -96.5, 38.25), (2154, 2.5, 47), (3006, 15.5, 60.25), (2193, 174.5, -41), (28355, 147, -37)]:
    x, y = transform('OGC:CRS84', f'EPSG:{code}', [lon], [lat])
    points[str(code)] = {'lonLat': [lon, lat], 'xy': [x[0], y[0]]}
x, y = transform(rasterio.crs.CRS.from_proj4('+proj=longlat +ellps=GRS80 +no_defs'), rasterio.crs.CRS.from_proj4(feet), [-73.9], [40.75])
points['user-defined-feet'] = {'lonLat': [-73.9, 40.75], 'xy': [x[0], y[0]]}
with rasterio.open(os.path.join(HERE, '..', 'olinda_dem_utm25s.tif')) as file:
    x, y = transform(file.crs, 'OGC:CRS84', [file.bounds.left], [file.bounds.top])
    points['olinda-corner'] = {'lonLat': [x[0], y[0]], 'xy': [file.bounds.left, file.bounds.top]}

with open(os.path.join(HERE, 'expected.json'), 'w') as out:
    json.dump({'library': f'rasterio {rasterio.__version__}', 'files': files, 'points': points}, out)
