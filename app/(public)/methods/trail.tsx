import Link from 'next/link';

/** Where this page hangs. */
export const Trail = ({ here }: { readonly here: string }) => (
  <nav aria-label="Place" className="mb-2 flex items-center gap-2.5 text-ui text-ink-2"><Link href="/methods" className="inline-flex min-h-8 items-center">Methods</Link><span aria-hidden>/</span><span aria-current="page">{here}</span></nav>
);
