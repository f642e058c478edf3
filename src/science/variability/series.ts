/** Readings of one star in one band on a common zero point, in order of time. */
export interface Series {
  readonly mag: ArrayLike<number>;
  readonly sigma_mag: ArrayLike<number>;
}
