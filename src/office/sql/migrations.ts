/**
 * Numbered, in order, append-only; the same statements for SQLite and PostgreSQL and for engines that speak PostgreSQL:
 * text, bigint, integer; no sequences, triggers, foreign keys, arrays or JSON types. Keys of survey data begin with `survey`.
 */
export const migrations: readonly { name: string; statements: readonly string[] }[] = [
  {
    name: 'people and devices',
    statements: [
      `create table meta (name text primary key, value text not null)`,
      `create table branches (branch text primary key, name text not null, next_sheet bigint not null, made_at text not null)`,
      `create table accounts (account text primary key, branch text not null, name text not null, role text not null,
        made_at text not null, left_at text)`,
      `create index accounts_by_branch on accounts (branch)`,
      `create table devices (device text primary key, account text not null, label text not null,
        token_hash text not null unique, record text not null, made_at text not null, seen_at text, revoked_at text)`,
      `create index devices_by_account on devices (account)`,
      `create table codes (code_hash text primary key, account text not null, made_by text not null,
        expires bigint not null, used_at text)`,
    ],
  },
  {
    name: 'the record',
    statements: [
      `create table surveys (survey text primary key, branch text not null, name text not null, client text,
        size bigint not null, made_at text not null, changed_at text not null, erased_at text,
        verdict text, good_until text, judged_size bigint not null)`,
      `create index surveys_by_branch on surveys (branch, name, survey)`,
      `create index surveys_by_client on surveys (branch, client)`,
      `create table marks (survey text not null, device text not null, n bigint not null, primary key (survey, device))`,
      `create table facts (survey text not null, device text not null, n bigint not null, body text not null,
        author text not null, via text not null, at text not null, primary key (survey, device, n))`,
      `create table photos (survey text not null, photo text not null, type text not null, bytes bigint not null,
        author text not null, at text not null, primary key (survey, photo))`,
      `create index photos_by_hash on photos (photo)`,
    ],
  },
  {
    name: 'signatures, sheets, shares, givings, fixes',
    statements: [
      `create table signatures (survey text not null, signature text not null, walk text not null, account text not null,
        name text not null, statement text not null, have text not null, at text not null,
        primary key (survey, signature))`,
      `create table sheets (survey text not null, number bigint not null, walk text not null, form text not null,
        title text not null, verdict text not null, body text not null, facts text not null, team text not null,
        have text not null, changes text not null, issued_by text not null, issued_at text not null,
        good_until text not null, replaced_by bigint, withdrawn_at text, withdrawn_why text,
        primary key (survey, number))`,
      `create table shares (survey text not null, share text not null, number bigint not null,
        token_hash text not null unique, made_by text not null, made_at text not null, expires bigint not null,
        revoked_at text, opened bigint not null, opened_at text, primary key (survey, share))`,
      `create table givings (survey text not null, giving text not null, number bigint not null, form text not null,
        given_to text not null, given_by text not null, given_at text not null, told_at text, reply text,
        replied_at text, primary key (survey, giving))`,
      `create table fixes (survey text not null, fix text not null, text text not null, owner text not null, due text,
        status text not null, note text not null, changed_by text not null, changed_at text not null,
        primary key (survey, fix))`,
    ],
  },
  {
    name: 'audit and jobs',
    statements: [
      `create table audit (branch text not null, entry text not null, at text not null, account text not null,
        device text not null, act text not null, survey text, detail text not null, primary key (branch, entry))`,
      `create table jobs (job text primary key, branch text not null, kind text not null, detail text not null,
        made_by text not null, made_at text not null, total bigint not null)`,
      `create table job_items (job text not null, survey text not null, state text not null, lease_owner text,
        lease_until bigint not null, result text, primary key (job, survey))`,
      `create index job_items_by_state on job_items (state, lease_until)`,
    ],
  },
]
