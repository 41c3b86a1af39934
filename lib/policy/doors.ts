import type { AccountAction, SubmissionAction } from './actions';
import type { REVIEW_DOORS } from './review-doors';

/** What a door asks of policy. `own-session` doors concern nobody but the caller's own sign-in. */
export type DoorPolicy = SubmissionAction | AccountAction | 'own-session' | 'anyone';

/**
 * Every way in: route handlers (`METHOD /path`), server actions (`action file.name`) and pages
 * (`page /path`), each with what it asks of policy. A door that is not here does not compile in the
 * wrappers, and the matrix test fails for a file under `app` that is not here.
 */
export const DOORS = {
  'GET /api/health/live': ['anyone'],
  'GET /api/health/ready': ['anyone'],
  'GET /api/auth/*': ['own-session'],
  'POST /api/auth/*': ['own-session'],
  'GET /api/v1/submissions': ['submission.list-own'],
  'POST /api/v1/submissions': ['submission.create'],
  'GET /api/v1/submissions/{id}': ['submission.view-draft', 'submission.view-review', 'submission.view-public'],
  'GET /api/v1/submissions/{id}/runs': ['submission.view-draft', 'submission.view-review', 'submission.view-public'],
  'GET /api/v1/submissions/{id}/events': ['submission.view-draft', 'submission.view-review', 'submission.view-public'],
  'GET /api/v1/submissions/{id}/sheet': ['submission.view-draft', 'submission.view-review', 'submission.view-public'],
  'GET /api/v1/submissions/{id}/files/{fileId}': ['submission.view-draft', 'submission.view-review', 'submission.view-public'],
  'GET /api/v1/submissions/{id}/files/{fileId}/structure': ['submission.view-draft', 'submission.view-review', 'submission.view-public'],
  'GET /api/v1/submissions/{id}/figures': ['submission.view-draft', 'submission.view-review', 'submission.view-public'],
  'POST /api/v1/submissions/{id}/files': ['submission.edit'],
  'DELETE /api/v1/submissions/{id}/files': ['submission.edit'],
  'PUT /api/v1/submissions/{id}/answers': ['submission.edit'],
  'PUT /api/v1/submissions/{id}/candidates': ['submission.answer-candidate'],
  'POST /api/v1/submissions/{id}/candidates': ['submission.edit'],
  'POST /api/v1/submissions/{id}/uploads': ['submission.edit'],
  'PUT /api/v1/submissions/{id}/uploads/{uploadId}/parts/{number}': ['submission.edit'],
  'POST /api/v1/submissions/{id}/uploads/{uploadId}': ['submission.edit'],
  'DELETE /api/v1/submissions/{id}/uploads/{uploadId}': ['submission.edit'],
  'PATCH /api/v1/submissions/{id}': ['submission.edit'],
  'POST /api/v1/submissions/{id}/check': ['submission.check'],
  'POST /api/v1/submissions/{id}/runs/{runId}/stop': ['submission.stop-run'],
  'POST /api/v1/submissions/{id}/lodge': ['submission.lodge'],
  'POST /api/v1/submissions/{id}/withdraw': ['submission.withdraw'],
  'POST /api/v1/submissions/{id}/revise': ['submission.revise'],
  'GET /api/v1/submissions/{id}/variations': ['submission.view-variations'],
  'POST /api/v1/submissions/{id}/variations': ['submission.vary'],
  'GET /api/v1/submissions/{id}/variations/{variationId}': ['submission.view-variation'],
  'PUT /api/v1/submissions/{id}/variations/{variationId}/link': ['submission.share-variation'],
  'GET /api/v1/openapi.json': ['anyone'],
  'GET /schemas/{format}/{version}': ['anyone'],
  'GET /api/v1/jobs/failed': ['admin.read-jobs'],
  'POST /api/v1/jobs/{id}/retry': ['admin.retry-job'],
  'GET /account/export': ['account.read-own'],
  'action account.saveProfile': ['account.edit-own'],
  'action account.giveAddress': ['account.edit-own'],
  'action account.confirmAddress': ['account.edit-own'],
  'action account.giveUp': ['account.edit-own'],
  'action account.unlinkOrcid': ['account.edit-own'],
  'action account.endSession': ['account.edit-own'],
  'action account.endOtherSessions': ['account.edit-own'],
  'action account.chooseLetters': ['account.edit-own'],
  'action tokens.create': ['account.manage-tokens'],
  'action tokens.revoke': ['account.manage-tokens'],
  'action compose.createDraft': ['submission.create'],
  'action compose.saveDraft': ['submission.edit'],
  // Needs both: to see it as its author, and to begin a submission.
  'action compose.duplicate': ['submission.create', 'submission.view-draft'],
  'action compose.listEarlier': ['submission.list-own'],
  'action compose.takeOverFile': ['submission.edit'],
  'action compose.restoreFile': ['submission.edit'],
  'action compose.removeFile': ['submission.edit'],
  'action compose.answerFinding': ['submission.edit'],
  'action candidates.answer': ['submission.answer-candidate'],
  'action candidates.takeOver': ['submission.edit'],
  'action compose.check': ['submission.check'],
  'action compose.lodge': ['submission.lodge'],
  'action compose.revise': ['submission.revise'],
  'action compose.withdraw': ['submission.withdraw'],
  'action variations.request': ['submission.vary'],
  'action runs.stop': ['submission.stop-run'],
  'action variations.openByLink': ['submission.share-variation'],
  'action compose.addCoAuthor': ['submission.manage-people'],
  'action compose.removeCoAuthor': ['submission.manage-people'],
  'action compose.restoreCoAuthor': ['submission.manage-people'],
  'action compose.confirmAuthorship': ['submission.confirm-authorship'],
} as const satisfies Readonly<Record<string, readonly DoorPolicy[]>>;

/** An id that is in no table does not compile in the wrappers. Pages stand in `page-doors.ts`. */
export type Door = keyof typeof DOORS | keyof typeof REVIEW_DOORS;
