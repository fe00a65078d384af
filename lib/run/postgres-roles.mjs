import { join } from "node:path";
import { run, tailOf } from "./commands.mjs";
import { Problem } from "./words.mjs";

/**
 * A way to run SQL as the cluster's administrator. The text goes in by a pipe and the password by the environment, so
 * neither shows in the list of processes.
 * @param {string} programs folder of psql
 * @param {number} port
 * @param {string} password
 * @returns {(database: string, sql: string) => Promise<string>} rows as lines, fields separated by |
 */
export function openPsql(programs, port, password) {
  return async (database, sql) => {
    const args = ["-X", "-q", "-A", "-t", "-v", "ON_ERROR_STOP=1", "-h", "127.0.0.1", "-p", String(port)];
    args.push("-U", "dwellbook_admin", "-d", database);
    const env = { PATH: process.env.PATH, PGPASSWORD: password, PGCONNECT_TIMEOUT: "10", LC_ALL: "C.UTF-8" };
    const result = await run(join(programs, "psql"), args, { env, input: sql });
    if (result.code === 0) return result.out;
    throw new Problem(`PostgreSQL on port ${port} refused a set-up step:\n${tailOf(result.err)}`);
  };
}

/** Makes a role that may log in if it is missing, and sets the password either way. */
const roleSql = (role, password) => `
do $$ begin
  if not exists (select from pg_roles where rolname = '${role}') then create role ${role}; end if;
end $$;
alter role ${role} login nosuperuser nocreatedb nocreaterole password '${password}';`;

/**
 * What a database of Dwellbook's needs before its migrations: it belongs to the owner role, and the application role
 * may connect and make its own schema for the job queue.
 * @param {string} database
 */
export function grantSql(database) {
  return `
revoke all on database ${database} from public;
grant connect, temporary, create on database ${database} to dwellbook_app;
alter database ${database} set timezone to 'UTC';`;
}

/**
 * Makes sure of the two roles and the database. The owner is a member of the application role, so that a migration
 * can make things that belong to the application; not the other way round: the application must not reach the ledger.
 * @param {(database: string, sql: string) => Promise<string>} psql
 * @param {{ owner: string, app: string }} passwords
 */
export async function ensureRolesAndDatabase(psql, passwords) {
  await psql(
    "postgres",
    `${roleSql("dwellbook_owner", passwords.owner)}${roleSql("dwellbook_app", passwords.app)}
grant dwellbook_app to dwellbook_owner;`,
  );
  const found = await psql("postgres", "select 1 from pg_database where datname = 'dwellbook'");
  if (found.trim() === "") await createDatabase(psql, "dwellbook");
}

/**
 * Makes an empty database that belongs to the owner role.
 * @param {(database: string, sql: string) => Promise<string>} psql
 * @param {string} database a plain name
 */
export async function createDatabase(psql, database) {
  await psql("postgres", `create database ${database} owner dwellbook_owner`);
  await psql("postgres", grantSql(database));
}
