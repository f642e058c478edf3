import { classFlag } from './class-flag.js';

/** On the cooling sequences of log g 8, or their branches 0.75 mag above and 0.85 below (tracks/white-dwarfs.ts). */
export const whiteDwarf = classFlag('white-dwarf', 'white dwarf', ['WD']);
