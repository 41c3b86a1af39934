import type { ConventionId } from './convention';

/**
 * Rows that no change of a setting, edit of what a file means or factor can put into effect (decisions 0119, 0134): why the search does
 * not try them, to stand after "because".
 */
export const notTried: Readonly<Partial<Record<ConventionId, string>>> = {
  C07: 'the house finds the best phase by a rule of its own, and a sheet has no word for another',
  C21: 'a sign of the whole series changes no norm, and where phases are compared the alignment takes it out',
  C26: 'the phases of the harmonics stand in the file, and one origin of the azimuth cannot be told from another without its author',
  C28: 'it needs the radius and the file as it was before its times were shifted',
  C29: 'it needs a file of the other extraction: a finite radius, an extrapolation and a characteristic one are different data',
  C34: 'the house’s own derivative is taken; what another stencil left in a file cannot be undone',
  C38: 'the house refines every maximum between its samples, and a sheet has no word for a coarser grid',
  C39: 'the house’s own rule fills in between the points, and no sheet has a word for another; a curve attached with more points settles it',
  C44: 'it needs masses and spins at the other time, which are other numbers and not a reading of these',
  C51: 'it needs the record of the background, which is part of the file or is not there',
  C52: 'it needs the spacings of the other author’s runs; those of the sheet are declared one by one',
  C54: 'other digits of a constant move a number by less than a tolerance holds',
};
