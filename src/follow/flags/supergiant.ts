import { classFlag } from './class-flag.js';

/** Ib, Iab and Ia together: which of them it is, photometry can hardly tell (tracks/evolved.ts). */
export const supergiant = classFlag('supergiant', 'supergiant', ['Ib', 'Iab', 'Ia']);
