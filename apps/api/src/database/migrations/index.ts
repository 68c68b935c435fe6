import { FirstSchema1764576000001 } from './0001-first-schema.ts';
import { RecordsThatStay1764576000002 } from './0002-records-that-stay.ts';
import { WholeDesks1764576000003 } from './0003-whole-desks.ts';

/** In order; a class a migration, because a bundle has no folder to scan. */
export const migrations = [FirstSchema1764576000001, RecordsThatStay1764576000002, WholeDesks1764576000003];
