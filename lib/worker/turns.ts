import { SEARCHING, URGENCY, type WaitingFlag } from '@/lib/jobs/urgency';

/** One run that is under way, as seen by whoever computes it. */
export interface Turn {
  /** Called at once with where it stands, and again whenever it has to step aside or may go on. */
  readonly follow: (listener: (aside: boolean) => void) => void;
  /** The numbers are there and the search for other readings begins. */
  readonly searching: () => void;
  /** Aborts when this run has to give its slot back and begin anew. */
  readonly putOff: AbortSignal;
  readonly leave: () => void;
}

interface Seat {
  readonly urgency: number;
  readonly giveBack: AbortController;
  searches: boolean;
  aside: boolean;
  listener: (aside: boolean) => void;
}

const givesWay = ({ searches, urgency }: Seat): boolean => searches || urgency >= URGENCY.official;

export interface House {
  /** Runs that may be under way at once. */
  readonly slots: number;
  /** Runs among them that may compute; the others stand still in the middle. */
  readonly cores: number;
}

/**
 * Who computes now, of the runs that this worker has taken. The most urgent have the cores, numbers before
 * searches. The last slot is kept for numbers that somebody waits for: when searches and what can wait hold all
 * of them, the least urgent gives its slot back.
 */
export class Turns {
  /** In the order of their coming. */
  private seats: readonly Seat[] = [];
  /** Questions to the queue that have no answer yet; each may take a slot. */
  private asking = 0;

  constructor(private readonly house: House) {}

  /** Before each question to the queue: the words on jobs that have to stay there. */
  ask(): WaitingFlag[] {
    const held = this.seats.length + this.asking++;
    return held >= this.house.slots - 1 ? ['can-wait', 'put-off'] : held >= this.house.cores ? ['unhurried'] : [];
  }

  answered(): void {
    this.asking = Math.max(0, this.asking - 1);
  }

  enter(urgency: number): Turn {
    const seat: Seat = { urgency, giveBack: new AbortController(), searches: false, aside: false, listener: () => undefined };
    this.seats = [...this.seats, seat];
    this.settle();
    return {
      putOff: seat.giveBack.signal,
      follow: (listener) => (seat.listener = listener)(seat.aside),
      searching: () => this.search(seat),
      leave: () => this.leave(seat),
    };
  }

  private search(seat: Seat): void {
    seat.searches = true;
    if (this.seats.length >= this.house.slots && this.seats.every(givesWay)) this.ranked().at(-1)?.giveBack.abort();
    this.settle();
  }

  private leave(seat: Seat): void {
    this.seats = this.seats.filter((one) => one !== seat);
    this.settle();
  }

  private ranked(): readonly Seat[] {
    const rank = ({ urgency, searches }: Seat): number => urgency + (searches ? SEARCHING : 0);
    return this.seats.toSorted((a, b) => rank(a) - rank(b));
  }

  private settle(): void {
    for (const [place, seat] of this.ranked().entries()) {
      const aside = place >= this.house.cores;
      if (aside === seat.aside) continue;
      seat.aside = aside;
      seat.listener(aside);
    }
  }
}
