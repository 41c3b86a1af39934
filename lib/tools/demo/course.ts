import type { DemoRoom } from './demo-room';
import type { DemoActors } from './open-accounts';

/** One submission of the demonstration, from an empty draft to where it shall stand. */
export interface Course {
  readonly title: string;
  readonly stands: string;
  /** False: begun when the site is open, and measured by its worker; nobody shall wait for it. */
  readonly beforeOpening: boolean;
  readonly run: (room: DemoRoom, people: DemoActors) => Promise<void>;
}
