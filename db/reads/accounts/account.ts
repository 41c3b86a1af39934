import { eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';

export async function findAccount(reader: Reader, userId: string) {
  const [row] = await reader.select({ id: users.id, name: users.name, email: users.email, role: users.role, affiliation: users.affiliation }).from(users).where(eq(users.id, userId));
  return row;
}
