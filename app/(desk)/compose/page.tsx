import { redirect } from 'next/navigation';
import { loadMember } from '@/lib/http/page-guard';

/** A new draft begins from the list of one's own. */
export default async function ComposeStart(): Promise<never> {
  await loadMember('/submissions');
  redirect('/submissions');
}
