/**
 * The demonstration: invented people of invented groups take a few claims through the whole course.
 * Every step is the verb a person would use, and every number is computed by the engine here and now.
 *
 * This file: who they are. The address of everybody ends in .example, so that no letter can leave.
 */
import type { AccountRole } from '@/lib/policy/account-role';

export interface DemoPerson {
  /** What they are asked to do in the demonstration; printed beside their password. */
  readonly part: string;
  readonly name: string;
  readonly email: string;
  readonly affiliation: string;
  readonly role: AccountRole;
  /** One of the local provider's (`lib/tools/fakes/openid-people.ts`): nobody's, by its last character. */
  readonly linkedOrcid?: string;
  /** Below the block from which iDs are given out, so nobody's either. */
  readonly typedOrcid?: string;
}

const LARKFIELD = 'Larkfield Wave Group';
const COUNTERFOIL = 'Counterfoil desk';

export const DEMO_PEOPLE = {
  marrable: { part: 'author', name: 'T. Marrable', email: 't.marrable@larkfield.example', affiliation: LARKFIELD, role: 'member', linkedOrcid: '0000-0000-4210-7736' },
  quennell: { part: 'co-author', name: 'L. Quennell', email: 'l.quennell@larkfield.example', affiliation: LARKFIELD, role: 'member', typedOrcid: '0000-0000-0000-001X' },
  vasterling: { part: 'referee', name: 'S. Vasterling', email: 's.vasterling@northquay.example', affiliation: 'North Quay Astrophysics', role: 'member' },
  tansley: { part: 'second referee', name: 'E. Tansley-Mbeki', email: 'e.tansley-mbeki@hollowell.example', affiliation: 'Hollowell Computation Centre', role: 'member' },
  amsel: { part: 'editor', name: 'R. Amsel', email: 'r.amsel@counterfoil.example', affiliation: COUNTERFOIL, role: 'editor' },
  szenthe: { part: 'administrator', name: 'I. Szenthe-Crowe', email: 'i.szenthe-crowe@counterfoil.example', affiliation: COUNTERFOIL, role: 'administrator' },
  ondaro: { part: 'author of the loudness', name: 'M. Ondaro', email: 'm.ondaro@saltern.example', affiliation: 'Saltern Institute of Strong Gravity', role: 'member' },
  brightwater: { part: 'author of the match', name: 'H. Brightwater', email: 'h.brightwater@oxbow.example', affiliation: 'Oxbow Relativity Unit', role: 'member', linkedOrcid: '0000-0000-4210-8159' },
  dovrel: { part: 'author of the energy', name: 'K. Dovrel', email: 'k.dovrel@hollowell.example', affiliation: 'Hollowell Computation Centre', role: 'member' },
  okonjo: { part: 'second editor', name: 'J. Okonjo-Vale', email: 'j.okonjo-vale@counterfoil.example', affiliation: COUNTERFOIL, role: 'editor' },
  pellworm: { part: 'author of the twin', name: 'D. Pellworm', email: 'd.pellworm@northquay.example', affiliation: 'North Quay Astrophysics', role: 'member' },
  lindmere: { part: 'co-author at Saltern', name: 'A. Lindmere', email: 'a.lindmere@saltern.example', affiliation: 'Saltern Institute of Strong Gravity', role: 'member' },
  hartsease: { part: 'co-author at Oxbow', name: 'F. Hartsease', email: 'f.hartsease@oxbow.example', affiliation: 'Oxbow Relativity Unit', role: 'member' },
} as const satisfies Readonly<Record<string, DemoPerson>>;

export type DemoName = keyof typeof DEMO_PEOPLE;
