/** Where the curves of a run are fetched when a claim is opened. */
export const figuresHref = (submissionId: string, runId: string): string => `/api/v1/submissions/${submissionId}/figures?run=${runId}`;
