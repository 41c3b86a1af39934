import { LoadingList } from '@/app/_ui/primitives/page-state';

/** Only here: under a loading file a page has answered 200 before it can say that it does not exist. */
export default function Loading() {
  return <div className="wrap pt-10"><h1 className="mb-6">Register</h1><LoadingList what="the register" rows={6} /></div>;
}
