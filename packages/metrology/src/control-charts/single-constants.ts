import { groupCount, guarded } from '../distributions/guarded.ts';
import * as constants from './constants.ts';

const n = ['n', groupCount] as const;

/** d2(n) = E(W)/σ: the mean range of n normal readings, n from 2 to 200; undetermined for any other n. ISO 7870-2:2013. */
export const d2 = guarded('d2', constants.d2, [n]);
/** d3(n): the standard deviation of the range of n normal readings in σ, n from 2 to 200. ISO 7870-2:2013. */
export const d3 = guarded('d3', constants.d3, [n]);
/** c4(n) = E(s)/σ = √(2/(n − 1))·Γ(n/2)/Γ((n − 1)/2), n from 2 to 200. ISO 7870-2:2013. */
export const c4 = guarded('c4', constants.c4, [n]);
