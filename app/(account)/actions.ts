'use server';
import { z } from 'zod';
import { askAuth } from '@/lib/http/auth-cookies';
import { defineAction } from '@/lib/http/define-action';

const email = z.email('an e-mail address').max(254);
const password = z.string().min(1, 'a password').max(256);

export const signIn = defineAction({
  door: 'action account.signIn',
  input: z.strictObject({ email, password }),
  handle: ({ input }) => askAuth('/sign-in/email', input),
});

export const signUp = defineAction({
  door: 'action account.signUp',
  input: z.strictObject({ name: z.string().trim().min(1, 'a name').max(120), email, password }),
  handle: ({ input }) => askAuth('/sign-up/email', input),
});

export const signOut = defineAction({
  door: 'action account.signOut',
  input: z.strictObject({}),
  handle: () => askAuth('/sign-out', {}),
});

export const requestPasswordReset = defineAction({
  door: 'action account.requestPasswordReset',
  input: z.strictObject({ email }),
  handle: ({ input }) => askAuth('/request-password-reset', input),
});

export const choosePassword = defineAction({
  door: 'action account.choosePassword',
  input: z.strictObject({ token: z.string().min(1).max(200), newPassword: password }),
  handle: ({ input }) => askAuth('/reset-password', input),
});
