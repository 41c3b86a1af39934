import { auth } from './auth';

export interface CurrentSession {
  readonly id: string;
  readonly createdAt: Date;
}

/** The session behind this request's cookie; its token stays here. */
export async function currentSession(headers: Headers): Promise<CurrentSession | null> {
  const found = await auth().api.getSession({ headers: new Headers({ cookie: headers.get('cookie') ?? '' }) });
  return found && { id: found.session.id, createdAt: found.session.createdAt };
}
