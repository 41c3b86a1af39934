import { LoadingList, Skeleton } from '@/app/_ui/primitives/page-state';

/** Only here: under a loading file a page has answered 200 before it can say that it does not exist. */
export default function Loading() {
  return (
    <div className="wrap pt-10">
      <h1>Register</h1>
      <div className="my-6 grid gap-2"><Skeleton width="40ch" /><Skeleton width="100%" tall /></div>
      <LoadingList what="the register" rows={6} />
    </div>
  );
}
