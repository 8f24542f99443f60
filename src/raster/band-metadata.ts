import { isVoid, type RasterOut } from './raster-out.ts';

/** Least, greatest, mean value and standard deviation (of the population) of the cells that are not void. */
export interface BandStatistics {
  readonly count: number;
  readonly minimum: number;
  readonly maximum: number;
  readonly mean: number;
  readonly standardDeviation: number;
}

export function bandStatistics(raster: RasterOut): BandStatistics {
  const { samples, noData } = raster;
  let count = 0;
  let sum = 0;
  let minimum = Number.POSITIVE_INFINITY;
  let maximum = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < samples.length; i++) {
    const sample = samples[i];
    if (isVoid(sample, noData)) continue;
    count++;
    sum += sample;
    if (sample < minimum) minimum = sample;
    if (sample > maximum) maximum = sample;
  }
  const mean = sum / count;
  let squares = 0;
  // A second pass, since the sum of squares alone loses all digits on high, flat ground.
  for (let i = 0; i < samples.length; i++) {
    const sample = samples[i];
    if (!isVoid(sample, noData)) squares += (sample - mean) * (sample - mean);
  }
  return { count, minimum, maximum, mean, standardDeviation: Math.sqrt(squares / count) };
}

/** The text of tag 42112: what the band holds, its unit, its statistics. All void: no statistics but the share. */
export function bandMetadata(raster: RasterOut): string {
  const statistics = bandStatistics(raster);
  const { description, unit } = raster.metadata ?? {};
  const items: string[] = [];
  if (description) items.push(item('DESCRIPTION', description, 'description'));
  if (unit) items.push(item('UNITTYPE', unit, 'unittype'));
  if (statistics.count > 0) {
    items.push(
      item('STATISTICS_MAXIMUM', `${statistics.maximum}`),
      item('STATISTICS_MEAN', `${statistics.mean}`),
      item('STATISTICS_MINIMUM', `${statistics.minimum}`),
      item('STATISTICS_STDDEV', `${statistics.standardDeviation}`),
    );
  }
  const percent = (100 * statistics.count) / raster.samples.length;
  items.push(item('STATISTICS_VALID_PERCENT', `${Number(percent.toPrecision(6))}`));
  return `<GDALMetadata>\n${items.join('')}</GDALMetadata>\n`;
}

function item(name: string, value: string, role?: string): string {
  const mark = role === undefined ? '' : ` role="${role}"`;
  return `  <Item name="${name}" sample="0"${mark}>${escaped(value)}</Item>\n`;
}

function escaped(text: string): string {
  return text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
}
