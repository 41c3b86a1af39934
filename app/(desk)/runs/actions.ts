'use server';
import { z } from 'zod';
import { defineAction } from '@/lib/http/define-action';
import { stopRun as stop } from '@/lib/services/runs/stop-run';

const id = z.uuid({ version: 'v4' });

export const stopRun = defineAction({
  door: 'action runs.stop',
  input: z.strictObject({ id, runId: id }),
  handle: ({ actor, input }) => stop(actor, input.id, input.runId),
});
