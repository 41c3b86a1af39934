import { buttonClasses } from './_ui/primitives/button';
import { PlainState } from './_ui/primitives/page-state';

/** The same words for what does not exist and for what is not yours to see. Plain links: nothing in it runs. */
export const NothingHere = () => (
  <div className="wrap pt-10">
    <div className="max-w-[720px]">
      <PlainState level={1} title="Nothing here" actions={<a className={buttonClasses()} href="/register">Search the register</a>}>
        <p className="text-ink">There is no page at this address that you can read.</p>
        <p>A record keeps its address for ever; a draft is seen by its authors alone.</p>
      </PlainState>
    </div>
  </div>
);
