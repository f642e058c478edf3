import { classFlag } from './class-flag.js';

/** Class II, between the giants and the supergiants (tracks/evolved.ts). */
export const brightGiant = classFlag('bright-giant', 'bright giant', ['II']);
