import { unzlibSync } from 'fflate';
import { fromArrayBuffer, type GeoTIFF } from 'geotiff';
import { describe, expect, it } from 'vitest';
import type { RasterOut, Samples } from '../../src/raster/raster-out.ts';
import { cloudOptimizedGeoTiff } from '../../src/raster/write-cog.ts';
import { readDirectories, textOf, valuesOf } from './directory-reader.ts';
import { georeferenceOf, rasterOf, userDefinedKeys, wavyFloats } from './sample-rasters.ts';

async function opened(bytes: Uint8Array): Promise<GeoTIFF> {
  return fromArrayBuffer(bytes.slice().buffer as ArrayBuffer);
}

async function readBack(bytes: Uint8Array, level = 0): Promise<Samples> {
  const image = await (await opened(bytes)).getImage(level);
  return (await image.readRasters({ interleave: true })) as unknown as Samples;
}

/** Bits, not values: NaN equals NaN, −0 differs from 0. */
function bitsOf(samples: Samples): Uint8Array {
  return new Uint8Array(samples.buffer, samples.byteOffset, samples.byteLength);
}

describe('the layout of OGC Cloud Optimized GeoTIFF 21-026 and TIFF 6.0', () => {
  const raster = rasterOf(150, 75, wavyFloats(150, 75), Number.NaN);
  const bytes = cloudOptimizedGeoTiff(raster, { tileSize: 32 });
  const directories = readDirectories(bytes);

  it('starts with a little-endian header and the full resolution, directories one after the other', () => {
    expect([...bytes.subarray(0, 8)]).toEqual([0x49, 0x49, 42, 0, 8, 0, 0, 0]);
    let expected = 8;
    for (const directory of directories) {
      expect(directory.offset).toBe(expected);
      expected = directory.end;
    }
    const offsets = directories.flatMap((directory) => valuesOf(directory, 324));
    expect(Math.min(...offsets)).toBe(expected);
  });

  it('has overviews, each half the last rounded up, down to one tile', () => {
    const sides = directories.map((d) => [valuesOf(d, 256)[0], valuesOf(d, 257)[0], valuesOf(d, 254)[0]]);
    expect(sides).toEqual([
      [150, 75, 0],
      [75, 38, 1],
      [38, 19, 1],
      [19, 10, 1],
    ]);
    expect(valuesOf(directories[3], 324)).toHaveLength(1);
  });

  it('is tiled in every directory, with tile sides that are multiples of 16 and no strips', () => {
    for (const directory of directories) {
      expect(valuesOf(directory, 322)).toEqual([32]);
      expect(valuesOf(directory, 323)).toEqual([32]);
      expect(directory.tags).not.toContain(273);
      const across = Math.ceil(valuesOf(directory, 256)[0] / 32);
      const down = Math.ceil(valuesOf(directory, 257)[0] / 32);
      expect(valuesOf(directory, 324)).toHaveLength(across * down);
      expect(valuesOf(directory, 325)).toHaveLength(across * down);
    }
  });

  it('has its tags ascending, with the values that TIFF 6.0 gives them', () => {
    for (const directory of directories) {
      expect(directory.tags).toEqual([...directory.tags].sort((a, b) => a - b));
      expect(valuesOf(directory, 258)).toEqual([32]);
      expect(valuesOf(directory, 259)).toEqual([8]);
      expect(valuesOf(directory, 262)).toEqual([1]);
      expect(valuesOf(directory, 277)).toEqual([1]);
      expect(valuesOf(directory, 284)).toEqual([1]);
      expect(valuesOf(directory, 317)).toEqual([3]);
      expect(valuesOf(directory, 339)).toEqual([3]);
      expect(textOf(directory, 42113)).toBe('nan');
    }
  });

  it('holds the data of the smallest overview first, tile beside tile to the end of the file', () => {
    let at = directories[3].end;
    for (const directory of [...directories].reverse()) {
      const lengths = valuesOf(directory, 325);
      valuesOf(directory, 324).forEach((offset, i) => {
        expect(offset).toBe(at);
        at += lengths[i];
      });
    }
    expect(at).toBe(bytes.length);
  });

  it('deflates in zlib form (RFC 1950): method 8, header a multiple of 31, whole tiles', () => {
    for (const directory of directories) {
      const lengths = valuesOf(directory, 325);
      valuesOf(directory, 324).forEach((offset, i) => {
        const tile = bytes.subarray(offset, offset + lengths[i]);
        expect(tile[0] & 15).toBe(8);
        expect((tile[0] * 256 + tile[1]) % 31).toBe(0);
        expect(unzlibSync(tile)).toHaveLength(32 * 32 * 4);
      });
    }
  });

  it('gives the same bytes for the same raster, whatever the payload of its NaN', () => {
    const other = wavyFloats(150, 75);
    const words = new Uint32Array(other.buffer);
    for (let i = 0; i < other.length; i++) if (Number.isNaN(other[i])) words[i] = 0xffc12345;
    const again = cloudOptimizedGeoTiff(rasterOf(150, 75, other, Number.NaN), { tileSize: 32 });
    expect(Buffer.compare(again, bytes)).toBe(0);
  });
});

describe('predictors, by hand', () => {
  it('sorts float bytes by significance and differences them (TIFF Technical Note 3)', () => {
    // 1 = 3f800000, 2 = 40000000, then 2 repeated to the tile's side of 16.
    const bytes = cloudOptimizedGeoTiff(rasterOf(2, 1, Float32Array.of(1, 2)));
    const [directory] = readDirectories(bytes);
    const row = unzlibSync(bytes.subarray(valuesOf(directory, 324)[0])).subarray(0, 64);
    const planes = [[0x3f, ...Array(15).fill(0x40)], [0x80, ...Array(15).fill(0)], Array(32).fill(0)].flat();
    expect([...row]).toEqual(planes.map((byte, i) => (byte - (i > 0 ? planes[i - 1] : 0)) & 255));
  });

  it('differences integers along the row (TIFF 6.0 section 14)', () => {
    const bytes = cloudOptimizedGeoTiff(rasterOf(3, 1, Uint32Array.of(7, 4294967295, 256)));
    const [directory] = readDirectories(bytes);
    const row = new Uint32Array(unzlibSync(bytes.subarray(valuesOf(directory, 324)[0])).slice(0, 64).buffer);
    expect([...row]).toEqual([7, 4294967288, 257, ...Array(13).fill(0)]);
  });
});

describe('read back by geotiff.js', () => {
  const shapes = [
    [1, 1],
    [1, 70],
    [90, 1],
    [64, 64],
    [65, 31],
    [130, 97],
  ];
  for (const [width, height] of shapes) {
    it(`float32, uint32 and uint8 of ${width} × ${height} return bit for bit`, async () => {
      const floats = wavyFloats(width, height);
      const words = Uint32Array.from(floats, (_, i) => (i * 2654435761) % 4294967296);
      const octets = Uint8Array.from(floats, (_, i) => (i * 31 + (i >> 3)) & 255);
      for (const [samples, noData] of [
        [floats, Number.NaN],
        [words, 4294967295],
        [octets, 255],
      ] as const) {
        const bytes = cloudOptimizedGeoTiff(rasterOf(width, height, samples, noData), { tileSize: 32 });
        const back = await readBack(bytes);
        expect(back.constructor).toBe(samples.constructor);
        expect(Buffer.compare(bitsOf(back), bitsOf(samples))).toBe(0);
        const image = await (await opened(bytes)).getImage();
        expect(image.getGDALNoData()).toEqual(noData);
      }
    });
  }

  it('keeps voids given as a number, −0 and the ends of the float range', async () => {
    const samples = Float32Array.of(-9999, -0, 3.4028234663852886e38, 1e-45, -1.5, 0);
    const bytes = cloudOptimizedGeoTiff(rasterOf(3, 2, samples, -9999));
    expect(Buffer.compare(bitsOf(await readBack(bytes)), bitsOf(samples))).toBe(0);
  });
});

describe('overviews', () => {
  const n = Number.NaN;
  const samples = Float32Array.from([1, 2, n, 4, 9, 6, n, n, n, 8, n, n, 3, n, n, n]);
  const wide = (rule: 'mean' | 'min' | 'max' | 'nearest') => {
    // 4 × 4 cells in the corner of a 32 × 4 raster that is void elsewhere, so that one overview is made.
    const padded = new Float32Array(32 * 4).fill(n);
    for (let i = 0; i < 16; i++) padded[Math.floor(i / 4) * 32 + (i % 4)] = samples[i];
    return cloudOptimizedGeoTiff(rasterOf(32, 4, padded, n), { tileSize: 16, overviews: rule });
  };
  it.each([
    ['mean', [4.5, 4, 5.5, n]],
    ['min', [1, 4, 3, n]],
    ['max', [9, 4, 8, n]],
    ['nearest', [1, 4, 8, n]],
  ] as const)('%s leaves voids out', async (rule, expected) => {
    const back = await readBack(wide(rule), 1);
    expect([back[0], back[1], back[16], back[17]]).toEqual(expected);
  });

  it('rounds the mean of integers and keeps their voids', async () => {
    const octets = new Uint8Array(32).fill(255);
    octets.set([1, 2, 255, 7]);
    const bytes = cloudOptimizedGeoTiff(rasterOf(32, 1, octets, 255), { tileSize: 16, overviews: 'mean' });
    expect([...(await readBack(bytes, 1))].slice(0, 3)).toEqual([2, 7, 255]);
  });
});

describe('place, CRS and metadata', () => {
  it('puts the tie point on the corner for areas and on the centre for points (OGC GeoTIFF 1.1)', () => {
    const directory = [1, 1, 0, 3, 1024, 0, 1, 1, 1025, 0, 1, 2, 3072, 0, 1, 32710];
    const area = rasterOf(2, 1, Float32Array.of(1, 2));
    const point: RasterOut = {
      ...area,
      georeference: georeferenceOf({ directory, doubles: [], ascii: '' }, true),
    };
    const [ofArea] = readDirectories(cloudOptimizedGeoTiff(area));
    const [ofPoint] = readDirectories(cloudOptimizedGeoTiff(point));
    expect(valuesOf(ofArea, 33550)).toEqual([2, 2.5, 0]);
    expect(valuesOf(ofArea, 33922)).toEqual([0, 0, 0, 470000, 4588000, 0]);
    expect(valuesOf(ofPoint, 33922)).toEqual([0, 0, 0, 470001, 4587998.75, 0]);
  });

  it('copies user-defined CRS keys as they stood, in the first directory only', async () => {
    const raster = { ...rasterOf(40, 1, wavyFloats(40, 1)), georeference: georeferenceOf(userDefinedKeys) };
    const bytes = cloudOptimizedGeoTiff(raster, { tileSize: 16 });
    const [first, second] = readDirectories(bytes);
    expect(valuesOf(first, 34735)).toEqual(userDefinedKeys.directory);
    expect(valuesOf(first, 34736)).toEqual(userDefinedKeys.doubles);
    expect(textOf(first, 34737)).toBe(userDefinedKeys.ascii);
    expect(second.tags).not.toContain(34735);
    const keys = (await (await opened(bytes)).getImage()).getGeoKeys();
    expect(keys).toMatchObject({ ProjNatOriginLongGeoKey: -123.25, GTCitationGeoKey: 'Sallow grid 7' });
  });

  it('states unit, description and statistics, with markup escaped', async () => {
    const raster: RasterOut = {
      ...rasterOf(5, 1, Float32Array.of(1, 2, Number.NaN, 4, 5), Number.NaN),
      metadata: { description: 'level < brim & more', unit: 'm' },
    };
    const [directory] = readDirectories(cloudOptimizedGeoTiff(raster));
    const metadata = textOf(directory, 42112);
    expect(metadata).toContain('role="description">level &lt; brim &amp; more</Item>');
    expect(metadata).toContain('role="unittype">m</Item>');
    const value = (name: string) => metadata.match(new RegExp(`"${name}" sample="0">([^<]*)<`))?.[1];
    expect(value('STATISTICS_MINIMUM')).toBe('1');
    expect(value('STATISTICS_MAXIMUM')).toBe('5');
    expect(value('STATISTICS_MEAN')).toBe('3');
    expect(value('STATISTICS_STDDEV')).toBe(`${Math.sqrt(2.5)}`);
    expect(value('STATISTICS_VALID_PERCENT')).toBe('80');
  });

  it('states no statistics for a raster that is all void', () => {
    const [directory] = readDirectories(
      cloudOptimizedGeoTiff(rasterOf(2, 2, new Float32Array(4).fill(Number.NaN), Number.NaN)),
    );
    expect(textOf(directory, 42112)).toBe(
      '<GDALMetadata>\n  <Item name="STATISTICS_VALID_PERCENT" sample="0">0</Item>\n</GDALMetadata>\n',
    );
  });
});

describe('bad input, one sentence each', () => {
  const two = Float32Array.of(1, 2);
  const point = { ...rasterOf(2, 1, two), georeference: georeferenceOf(undefined, true) };
  it.each([
    [
      'sides',
      () => cloudOptimizedGeoTiff(rasterOf(0, 2, two)),
      'A raster of 0 × 2 cells was given; both sides must be whole numbers of at least 1.',
    ],
    [
      'length',
      () => cloudOptimizedGeoTiff(rasterOf(2, 2, two)),
      '2 samples were given for 2 × 2 cells; expected 4, row by row.',
    ],
    [
      'tile',
      () => cloudOptimizedGeoTiff(rasterOf(2, 1, two), { tileSize: 40 }),
      'A tile size of 40 was given; give a multiple of 16 from 16 to 4096.',
    ],
    [
      'no data',
      () => cloudOptimizedGeoTiff(rasterOf(1, 1, Uint8Array.of(1), 256)),
      'The no-data value 256 cannot be stored in a Uint8Array; give one of its values or null.',
    ],
    [
      'no data in floats',
      () => cloudOptimizedGeoTiff(rasterOf(2, 1, two, 0.1)),
      'The no-data value 0.1 cannot be stored in a Float32Array; give one of its values or null.',
    ],
    [
      'point',
      () => cloudOptimizedGeoTiff(point),
      'The georeference has pixelIsPoint true, its key 1025 says the contrary; make them agree.',
    ],
  ])('%s', (_, write, sentence) => {
    expect(write).toThrow(sentence);
  });
});

it('tells its progress by tiles done and lets itself be ended', () => {
  const raster = rasterOf(40, 1, wavyFloats(40, 1));
  const told: number[] = [];
  cloudOptimizedGeoTiff(raster, { tileSize: 16, progress: (fraction) => told.push(fraction) });
  expect(told).toEqual([1, 2, 3, 4, 5, 6].map((done) => done / 6));
  const end = () => {
    throw new Error('enough');
  };
  expect(() => cloudOptimizedGeoTiff(raster, { progress: end })).toThrow('enough');
});
