import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { depthLabel } from '../../src/elements/depth-label.ts';
import { messages } from '../../src/elements/messages.ts';
import { Voice } from '../../src/elements/voice.ts';
import { pageSentence, servedLanguage, words } from '../../src/elements/words.ts';
import { lightPalette } from '../../src/map/palette.ts';
import { caution } from '../../src/processes/caution.ts';

describe('words', () => {
  it('fills in values, numbers by the rules of the language', () => {
    expect(words('en', 'pageOf', { from: 1, to: 8, count: 3377 })).toBe('1–8 of 3,377');
    expect(words('de', 'pageOf', { from: 1, to: 8, count: 3377 })).toBe('1–8 of 3.377');
  });

  it('chooses the plural by the count', () => {
    expect(words('en', 'pondsAnnounced', { count: 1 })).toBe('1 pond found.');
    expect(words('en', 'pondsAnnounced', { count: 0 })).toBe('0 ponds found.');
  });

  it('falls back from a region to its language and from there to English', () => {
    expect(servedLanguage('en-GB')).toBe('en');
    expect(servedLanguage('EN')).toBe('en');
    expect(servedLanguage('tlh')).toBe('en');
  });

  it('names the language that is served, and writes numbers by the rules of the one asked for', () => {
    const voice = new Voice('de-DE');
    expect(voice.lang).toBe('en');
    expect(voice.measures.lang).toBe('de-DE');
    expect(voice.say('pageOf', { from: 1, to: 8, count: 3377 })).toBe('1–8 of 3.377');
  });

  it('says errors without options of the command line', () => {
    const sources = [
      'raster/vertical',
      'raster/reading-plan',
      'raster/open-terrain',
      'processes/typed-place',
    ];
    const written = sources.flatMap((name) => {
      const text = readFileSync(new URL(`../../src/${name}.ts`, import.meta.url), 'utf8');
      return text.match(/`[^`]*(?:--[a-z]|the input ")[^`]*`/g) ?? [];
    });
    // A unit that is missing is asked for and never told as an error.
    const told = written.filter((text) => !text.includes('does not say in which unit'));
    expect(told.length).toBeGreaterThan(5);
    for (const text of told) {
      const said = pageSentence('en', text.slice(1, -1).replace(/(--vertical-unit) \S+/, '$1 ft'));
      expect(said).not.toMatch(/--|input "|\(\)|,\s*[.;]/);
    }
    expect(
      pageSentence('en', 'At most 9 are read, so give an extent (--extent) or a budget (--cell-budget).'),
    ).toBe('At most 9 are read, so give an extent or a budget.');
  });

  it('says every message somewhere', () => {
    const folder = new URL('../../src/elements/', import.meta.url);
    const sources = readdirSync(folder)
      .filter((file) => file.endsWith('.ts') && file !== 'messages.ts')
      .map((file) => readFileSync(new URL(file, folder), 'utf8'))
      .join();
    expect(Object.keys(messages.en).filter((key) => !sources.includes(`'${key}'`))).toEqual([]);
  });

  it('carries the caution that results carry, word by word', () => {
    expect(words('en', 'caution')).toBe(caution);
  });

  it('labels depth classes, the lowest as shallow and never as safe', () => {
    const labels = (voice: Voice): string[] =>
      lightPalette.depths.map((_, i) => depthLabel(voice, lightPalette.depths, i).replaceAll('\u00a0', ' '));
    expect(labels(new Voice('en', 'metric'))).toEqual([
      'shallow, under 0.15 m',
      '0.15 m to 0.5 m',
      '0.5 m to 1 m',
      '1 m to 2 m',
      '2 m and more',
    ]);
    expect(labels(new Voice('en', 'us'))[0]).toBe('shallow, under 0.49 ft');
    expect(Object.values(messages.en).join()).not.toMatch(/\bsafe/i);
  });
});
