/** What every result carries: how far it may be trusted, and who decides. */
export const caution =
  'Screening from terrain alone: no sewers, infiltration limits, waves, momentum or structures beyond those entered. Elevations have an error and a datum; both matter. A pond whose catchment touches the edge of the data gets more water than is known here. Ground outside the extents is not thereby dry. This is not a regulatory flood map, and depth classes do not replace local rules: local codes and a licensed engineer decide.';
