import { quantities } from '@/lib/engine/quantities/registry';

/** A quantity of an older or newer engine is still named, by its id. */
export const quantityWord = (id: string): string => quantities.get(id)?.title ?? id.replaceAll('-', ' ').replace(/^./, (c) => c.toUpperCase());

export const quantityWords = (ids: readonly string[]): string => ids.map(quantityWord).join(', ');
