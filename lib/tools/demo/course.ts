import type { DemoRoom } from './demo-room';
import type { DemoActors } from './open-accounts';

/** One submission of the demonstration, from an empty draft to where it shall stand. */
export interface Course {
  readonly title: string;
  readonly stands: string;
  readonly run: (room: DemoRoom, people: DemoActors) => Promise<void>;
}
