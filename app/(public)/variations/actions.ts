'use server';
import { z } from 'zod';
import { defineAction } from '@/lib/http/define-action';
import { linkInput, openByLink as open } from '@/lib/services/variations/open-by-link';
import { requestVariation as request, variationInput } from '@/lib/services/variations/request-variation';

const id = z.uuid({ version: 'v4' });

export const requestVariation = defineAction({
  door: 'action variations.request',
  input: z.strictObject({ id, variation: variationInput }),
  handle: ({ actor, input }) => request(actor, input.id, input.variation),
});

export const openByLink = defineAction({
  door: 'action variations.openByLink',
  input: linkInput.extend({ id, variationId: id }),
  handle: ({ actor, input: { id: submissionId, variationId, ...link } }) => open(actor, submissionId, variationId, link),
});
