import type { DepthClass } from '../map/palette.ts';
import type { Voice } from './voice.ts';

/** A depth class in words; the lowest is called shallow, never safe. */
export function depthLabel({ say, measures }: Voice, classes: readonly DepthClass[], i: number): string {
  const from = measures.limit(classes[i].fromM);
  if (i === classes.length - 1) return say('legendDeep', { from });
  const to = measures.limit(classes[i + 1].fromM);
  return i === 0 ? say('legendShallow', { to }) : say('legendBetween', { from, to });
}
