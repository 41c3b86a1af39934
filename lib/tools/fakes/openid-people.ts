/**
 * Invented people of the local OpenID provider. Each iD has the form of an ORCID iD and a last
 * character that is wrong on purpose, so that none of them can be anybody's.
 */
export interface OpenIdPerson {
  readonly id: string;
  readonly name: string;
}

export const OPENID_PEOPLE: readonly OpenIdPerson[] = [
  { id: '0000-0000-4210-7736', name: 'T. Marrable' },
  { id: '0000-0000-4210-8159', name: 'H. Brightwater' },
  { id: '0000-0000-4210-9404', name: 'R. Amsel' },
  { id: '0000-0000-4211-0237', name: 'J. Pellworm' },
  { id: '0000-0000-4211-1872', name: 'A. Corriedale' },
];
