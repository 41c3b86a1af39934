import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { findProblemMeaning } from '@/lib/http/problem-meanings';
import { Facts } from '@/app/_ui/primitives/facts';

interface ProblemProps {
  readonly params: Promise<{ readonly code: string }>;
}

export async function generateMetadata({ params }: ProblemProps): Promise<Metadata> {
  return { title: findProblemMeaning((await params).code)?.title ?? 'Nothing here' };
}

/** What stands behind the `type` of a refusal. */
export default async function ProblemMeaning({ params }: ProblemProps) {
  const problem = findProblemMeaning((await params).code);
  if (!problem) notFound();
  return (
    <div className="wrap pt-10">
      <p className="mb-2 flex items-center gap-2.5 text-ui text-ink-2"><Link href="/interface" className="inline-flex min-h-8 items-center">Interface</Link><span aria-hidden>/</span><span>problems</span><span aria-hidden>/</span><span>{problem.code}</span></p>
      <h1 className="mb-4">{problem.title}</h1>
      <div className="max-w-measure"><Facts facts={[['Status', problem.status], ['Means', problem.means], ['Next', problem.next]]} /></div>
    </div>
  );
}
