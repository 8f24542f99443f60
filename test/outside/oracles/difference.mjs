/** The first place at which two JSON values differ, as words; null where they are equal. Numbers must be identical. */
export function firstDifference(recorded, found, path = '') {
  const bothObjects = [recorded, found].every((value) => typeof value === 'object' && value !== null);
  if (!bothObjects) {
    if (Object.is(recorded, found)) return null;
    return `${path || 'the whole'} is ${JSON.stringify(found)}, recorded is ${JSON.stringify(recorded)}`;
  }
  for (const key of new Set([...Object.keys(recorded), ...Object.keys(found)])) {
    const difference = firstDifference(recorded[key], found[key], path === '' ? key : `${path}.${key}`);
    if (difference !== null) return difference;
  }
  return null;
}
