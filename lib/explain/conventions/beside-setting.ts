import type { Convention, ConventionId } from './convention';
import { conventions } from './conventions';

/** Words that a file of the sheet carries, and that stand among the settings of a result: no setting says them. */
const byFileWord: Readonly<Record<string, readonly ConventionId[]>> = {
  negativeM: ['C23', 'C24'],
  radiusType: ['C27'],
  tetrad: ['C20', 'C48'],
  noise: ['C01', 'C02', 'C39', 'C40'],
};

const says = (convention: Convention, name: string): boolean => convention.settings.some((setting) => setting === name) || (byFileWord[name] ?? []).includes(convention.id);

/** The conventions that one row of settings belongs to, of those that move this quantity. */
export const besideSetting = (quantity: string, name: string): readonly Convention[] => conventions.filter((convention) => convention.affects.includes(quantity) && says(convention, name));

/** Those that move this quantity and that no setting of a sheet can say. */
export const unsaid = (quantity: string): readonly Convention[] => conventions.filter((convention) => convention.affects.includes(quantity) && convention.settings.length === 0);
