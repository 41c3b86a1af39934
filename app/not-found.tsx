import Link from 'next/link';
import { Logo } from './_ui/primitives/logo';
import { NothingHere } from './nothing-here';

export const metadata = { title: 'Nothing here' };

/** For addresses that no page answers; pages inside a group say the same within their own frame. */
export default function NotFound() {
  return (
    <>
      <header className="wrap flex min-h-14 items-center">
        <Link href="/" prefetch={false} className="inline-flex min-h-10 items-center gap-2 font-serif text-[19px]/[24px] font-semibold text-ink no-underline"><Logo className="size-7 text-link" />Counterfoil</Link>
      </header>
      <main id="main"><NothingHere /></main>
    </>
  );
}
