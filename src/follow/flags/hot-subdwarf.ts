import { classFlag } from './class-flag.js';

/** In the box of sdB and sdO stars, four magnitudes below the hot dwarfs (tracks/hot-subdwarfs.ts). */
export const hotSubdwarf = classFlag('hot-subdwarf', 'hot subdwarf', ['sdOB']);
