'use server';
import { z } from 'zod';
import { defineAction } from '@/lib/http/define-action';
import { createToken as create } from '@/lib/services/tokens/create-token';
import { revokeToken as revoke } from '@/lib/services/tokens/revoke-token';
import { tokenInput } from '@/lib/services/tokens/token-input';

export const createToken = defineAction({
  door: 'action tokens.create',
  input: tokenInput,
  rate: { points: 30, perS: 3600 },
  handle: ({ actor, input }) => create(actor, input),
});

export const revokeToken = defineAction({
  door: 'action tokens.revoke',
  input: z.strictObject({ id: z.uuid({ version: 'v4' }) }),
  handle: ({ actor, input }) => revoke(actor, input.id),
});
