import Link from 'next/link';
import { buttonClasses } from './_ui/primitives/button';
import { Logo } from './_ui/primitives/logo';
import { PlainState } from './_ui/primitives/page-state';

export const metadata = { title: 'Nothing here' };

/** One page for what does not exist and for what is not yours to see: the same words, and nothing in it that runs. */
export default function NotFound() {
  return (
    <div className="wrap">
      <header className="flex min-h-14 items-center">
        <Link href="/" prefetch={false} className="inline-flex min-h-10 items-center gap-2 font-serif text-[19px]/[24px] font-semibold text-ink no-underline"><Logo className="size-7 text-link" />Counterfoil</Link>
      </header>
      <main id="main" className="max-w-[720px] pt-10">
        <PlainState level={1} title="Nothing here" actions={<Link className={buttonClasses()} href="/register" prefetch={false}>Search the register</Link>}>
          <p className="text-ink">There is no page at this address that you can read.</p>
          <p>A record keeps its address for ever; a draft is seen by its authors alone.</p>
        </PlainState>
      </main>
    </div>
  );
}
