import type { DoorPolicy } from './doors';

/** The ways into review, decisions and records; see `doors.ts`. */
export const REVIEW_DOORS = {
  'GET /api/v1/submissions/{id}/desk': ['review.read-threads'],
  'GET /api/v1/submissions/{id}/threads': ['review.read-threads'],
  'POST /api/v1/submissions/{id}/threads': ['review.open-thread'],
  'POST /api/v1/threads/{id}/comments': ['review.comment'],
  'POST /api/v1/threads/{id}/close': ['review.set-thread-state'],
  'GET /api/v1/submissions/{id}/invitations': ['review.see-identities'],
  'POST /api/v1/submissions/{id}/invitations': ['review.invite'],
  'POST /api/v1/invitations/{id}/answer': ['review.answer-invitation'],
  'POST /api/v1/submissions/{id}/reports': ['review.report'],
  'POST /api/v1/submissions/{id}/notes': ['review.note-to-editor'],
  'GET /api/v1/submissions/{id}/decisions': ['review.see-identities'],
  'POST /api/v1/submissions/{id}/decisions': ['review.send-back', 'review.set-aside', 'review.enter'],
  'GET /api/v1/queue': ['queue.read'],
  'GET /api/v1/records': ['register.read'],
  'GET /api/v1/records/{id}': ['register.read'],
  'GET /api/v1/records/{id}/badge.svg': ['register.read'],
  'GET /records/{id}/record.json': ['register.read'],
  'GET /records/{id}/signature.json': ['register.read'],
  'GET /records/{id}/signed-record.json': ['register.read'],
  'GET /records/{id}/badge.svg': ['register.read'],
  'GET /keys/{file}': ['register.read'],
} as const satisfies Readonly<Record<string, readonly DoorPolicy[]>>;
