import { classFlag } from './class-flag.js';

/** Metal-poor, 0.9 to 1.5 mag below the dwarfs of its colour (tracks/subdwarfs.ts, after Ivezic et al. 2008). */
export const subdwarf = classFlag('subdwarf', 'metal-poor subdwarf', ['sd']);
