import type { DoorPolicy } from './doors';

/**
 * Every page and what it asks of policy before it shows anything. A page whose data a service gives
 * names that service's action; the matrix test fails for a page that is not here.
 */
export const PAGE_DOORS = {
  'page /': ['register.read'],
  'page /register': ['register.read'],
  'page /records/{id}': ['register.read'],
  'page /variations/{id}': ['submission.view-variation'],
  'page /methods': ['anyone'],
  'page /methods/{quantity}': ['anyone'],
  'page /methods/glossary': ['anyone'],
  'page /methods/conventions': ['anyone'],
  'page /methods/house-conventions': ['anyone'],
  'page /methods/noise': ['anyone'],
  'page /methods/findings': ['anyone'],
  'page /methods/budget': ['anyone'],
  'page /methods/candidates': ['anyone'],
  'page /interface': ['anyone'],
  'page /problems/{code}': ['anyone'],
  'page /sign-in': ['anyone'],
  'page /sign-up': ['anyone'],
  'page /forgotten-password': ['anyone'],
  'page /reset-password': ['anyone'],
  'page /account': ['account.read-own'],
  'page /account/address': ['account.read-own'],
  'page /account/second-factor': ['account.read-own'],
  'page /sign-in/second-factor': ['anyone'],
  'page /account/tokens': ['account.manage-tokens'],
  'page /compose': ['submission.create'],
  'page /compose/{id}': ['submission.view-draft'],
  'page /submissions': ['submission.list-own'],
  'page /submissions/{id}': ['submission.view-draft', 'submission.view-review'],
  'page /queue': ['queue.read'],
  'page /review/{id}': ['review.read-threads'],
  'page /review/{id}/report': ['review.report'],
  'page /review/{id}/decide': ['review.see-identities'],
  'page /desk': ['submission.list-own'],
  'page /desk/invitations/{id}': ['review.answer-invitation'],
} as const satisfies Readonly<Record<string, readonly DoorPolicy[]>>;
