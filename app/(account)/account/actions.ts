'use server';
import { z } from 'zod';
import { currentSession } from '@/lib/auth/current-session';
import { isPlaceholderAddress } from '@/lib/auth/placeholder-address';
import { defineAction } from '@/lib/http/define-action';
import { chooseLetters as choose } from '@/lib/services/accounts/choose-letters';
import { confirmAddress as confirm, giveAddress as give, giveUpAccount } from '@/lib/services/accounts/give-address';
import { endOtherSessions as endOthers, endSession as end } from '@/lib/services/accounts/own-sessions';
import { saveProfile as save } from '@/lib/services/accounts/save-profile';
import { unlinkOrcid as unlink } from '@/lib/services/accounts/unlink-orcid';

const nothing = z.strictObject({});
const name = z.string().trim().min(1, 'a name of at least one character').max(120);
const email = z.email('an address like name@place.example').max(254).refine((text) => !isPlaceholderAddress(text.toLowerCase()), 'an address that letters can reach');

export const saveProfile = defineAction({
  door: 'action account.saveProfile',
  input: z.strictObject({ name, affiliation: z.string().max(200), orcid: z.string().max(60) }),
  handle: ({ actor, input }) => save(actor, input),
});

/** Each sends a letter to an address that is not proven yet, so few are sent. */
export const giveAddress = defineAction({
  door: 'action account.giveAddress',
  input: z.strictObject({ name, email }),
  rate: { points: 6, perS: 3600 },
  handle: ({ actor, input }) => give(actor, input),
});

export const confirmAddress = defineAction({
  door: 'action account.confirmAddress',
  input: z.strictObject({ token: z.string().min(20).max(100) }),
  rate: { points: 20, perS: 3600 },
  handle: ({ actor, input }) => confirm(actor, input),
});

export const giveUp = defineAction({ door: 'action account.giveUp', input: nothing, handle: ({ actor }) => giveUpAccount(actor) });

export const unlinkOrcid = defineAction({ door: 'action account.unlinkOrcid', input: nothing, handle: ({ actor }) => unlink(actor) });

export const endSession = defineAction({
  door: 'action account.endSession',
  input: z.strictObject({ id: z.uuid({ version: 'v4' }) }),
  handle: ({ actor, input }) => end(actor, input),
});

export const endOtherSessions = defineAction({
  door: 'action account.endOtherSessions',
  input: nothing,
  handle: async ({ actor, headers }) => endOthers(actor, (await currentSession(headers))?.id ?? null),
});

export const chooseLetters = defineAction({
  door: 'action account.chooseLetters',
  input: z.strictObject({ reminder: z.boolean(), 'report-received': z.boolean() }),
  handle: ({ actor, input }) => choose(actor, input),
});
