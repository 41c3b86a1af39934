import { jobOperations, recordOperations } from './records';
import { reviewOperations } from './reviews';
import { submissionOperations } from './submissions';

/** Every door under /api/v1, in the order in which people read of them. */
export const OPERATIONS = [...submissionOperations, ...reviewOperations, ...recordOperations, ...jobOperations] as const;
