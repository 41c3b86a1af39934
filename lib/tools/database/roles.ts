import { Client, escapeIdentifier, escapeLiteral } from 'pg';

/** The names are fixed: migrations grant to them. */
export const ROLES = {
  owner: 'counterfoil_owner',
  web: 'counterfoil_web',
  worker: 'counterfoil_worker',
  signer: 'counterfoil_signer',
} as const;

export type RoleName = keyof typeof ROLES;
export type RoleUrls = Readonly<Record<RoleName, string>>;

/** Creates what is missing of the four roles and the owner's database; needs a superuser's address. */
export async function ensureRolesAndDatabase(adminUrl: string, urls: RoleUrls): Promise<void> {
  const admin = new Client({ connectionString: adminUrl });
  await admin.connect();
  try {
    for (const role of Object.keys(ROLES) as RoleName[]) await ensureRole(admin, role, urls[role]);
    await ensureDatabase(admin, databaseOf(urls.owner));
  } finally {
    await admin.end();
  }
}

/** Grants in the migrations go to fixed names, so another user name would own tables nobody can read. */
export function refuseOtherNames(urls: RoleUrls): void {
  for (const role of Object.keys(ROLES) as RoleName[]) {
    const seen = new URL(urls[role]).username;
    if (seen !== ROLES[role]) throw new Error(`The address of the ${role} role names the user "${seen}"; expected ${ROLES[role]}.`);
  }
}

export const databaseOf = (url: string): string => decodeURIComponent(new URL(url).pathname.slice(1));

async function ensureRole(admin: Client, role: RoleName, url: string): Promise<void> {
  const name = ROLES[role];
  const password = escapeLiteral(decodeURIComponent(new URL(url).password));
  const { rowCount } = await admin.query('select 1 from pg_roles where rolname = $1', [name]);
  const verb = rowCount ? 'alter' : 'create';
  await admin.query(`${verb} role ${name} login nosuperuser nocreatedb nocreaterole password ${password}`);
}

async function ensureDatabase(admin: Client, name: string): Promise<void> {
  const { rowCount } = await admin.query('select 1 from pg_database where datname = $1', [name]);
  if (!rowCount) await admin.query(`create database ${escapeIdentifier(name)} owner ${ROLES.owner}`);
}
