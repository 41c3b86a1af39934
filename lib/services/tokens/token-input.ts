import { z } from 'zod';
import { TOKEN_SCOPES } from '@/lib/policy/token-scopes';

/** How long a token may live. There is none without an end. */
export const TOKEN_DAYS = [7, 30, 90, 365] as const;

export const tokenInput = z.strictObject({
  name: z.string().trim().min(1, 'a name of 1 to 60 characters').max(60, 'a name of 1 to 60 characters'),
  scopes: z.array(z.enum(TOKEN_SCOPES)).min(1, 'at least one scope').max(TOKEN_SCOPES.length),
  days: z.union(TOKEN_DAYS.map((days) => z.literal(days))),
});
export type TokenInput = z.infer<typeof tokenInput>;
