'use client';
import { Trouble } from '@/app/(desk)/act-parts';
import { useAct } from '@/app/(desk)/use-act';
import { Button } from '@/app/_ui/primitives/button';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { giveUp } from '../actions';
import { loadAnew } from '../../load-anew';

/** The way back for somebody who came by ORCID and has an account with a password. */
export function GiveUp() {
  const giving = useAct(giveUp, () => loadAnew('/sign-in?next=/account'));
  return (
    <Disclosure summary="I have an account already">
      <p>This gives up the account that ORCID has just opened and frees your iD. Then sign in with your password and link ORCID on your account page.</p>
      <div className="mt-2 grid justify-items-start gap-2">
        <Button busy={giving.busy ? 'Giving it up' : null} onClick={() => void giving.run({})}>Give this one up and sign in</Button>
        <Trouble trouble={giving.trouble} />
      </div>
    </Disclosure>
  );
}
