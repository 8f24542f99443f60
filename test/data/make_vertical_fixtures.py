"""Elevation files with a vertical scale in their georeference, and how rasterio (Debian python3-rasterio) reads them.

Run: /usr/bin/python3 test/data/make_vertical_fixtures.py
Writes test/data/vertical/*.tif and expected.json. The library writes each file, some doubles of its tags are then
overwritten, and the library reads it back: expected values are stored × scale + offset as it tells them.
"""
import json
import os
import struct
import numpy as np
import rasterio
from rasterio.transform import from_origin

HERE = os.path.join(os.path.dirname(os.path.abspath(__file__)), 'vertical')
STORED = np.array([[-300, 0, 1], [20, 1234, 32000]], 'int16')
os.makedirs(HERE, exist_ok=True)


def overwrite(path, tag, values):
    data = bytearray(open(path, 'rb').read())
    at = struct.unpack('<I', data[4:8])[0]
    for i in range(struct.unpack('<H', data[at:at + 2])[0]):
        found, _, _, place = struct.unpack('<HHII', data[at + 2 + 12 * i:at + 14 + 12 * i])
        if found == tag:
            data[place:place + 8 * len(values)] = struct.pack(f'<{len(values)}d', *values)
    open(path, 'wb').write(data)


def make(name, crs, scale_z=None, tie=(0, 0), metadata=None):
    path = os.path.join(HERE, name + '.tif')
    with rasterio.open(path, 'w', driver='GTiff', width=3, height=2, count=1, dtype='int16', crs=crs,
                       transform=from_origin(500000, 5600000, 2, 2)) as file:
        file.write(STORED, 1)
        if metadata:
            file.scales, file.offsets = (metadata[0],), (metadata[1],)
    if scale_z is not None:
        overwrite(path, 33550, [2, 2, scale_z])
        overwrite(path, 33922, [0, 0, tie[0], 500000, 5600000, tie[1]])
    with rasterio.open(path) as file:
        scale, offset = file.scales[0], file.offsets[0]
        return {'scale': scale, 'offset': offset, 'values': [float(v) * scale + offset for v in file.read(1).ravel()]}


expected = {
    'scale-0': make('scale-0', 'EPSG:32631+5703', 0),
    'scale-1': make('scale-1', 'EPSG:32631+5703', 1),
    'scale-0.01': make('scale-0.01', 'EPSG:32631+5703', 0.01),
    'scale-0.01-tie-100': make('scale-0.01-tie-100', 'EPSG:32631+3855', 0.01, (0, 100)),
    'scale-0.01-tie-10-to-100': make('scale-0.01-tie-10-to-100', 'EPSG:32631+5703', 0.01, (10, 100)),
    'scale-1-tie-100': make('scale-1-tie-100', 'EPSG:32631+5703', 1, (0, 100)),
    'scale-minus-1': make('scale-minus-1', 'EPSG:32631+5703', -1),
    'no-vertical-keys': make('no-vertical-keys', 'EPSG:32631', 0.01, (0, 100)),
    'written-by-the-library': make('written-by-the-library', 'EPSG:32631+5703', metadata=(0.5, 7)),
    'written-by-the-library-flat': make('written-by-the-library-flat', 'EPSG:32631', metadata=(0.5, 7)),
    'metadata-beside-no-vertical-keys': make(
        'metadata-beside-no-vertical-keys', 'EPSG:32631', 0.5, (0, 7), metadata=(0.5, 7)),
}
with open(os.path.join(HERE, 'expected.json'), 'w') as out:
    json.dump(expected, out, indent=1)
    out.write('\n')
