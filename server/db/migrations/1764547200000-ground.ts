import type { MigrationInterface, QueryRunner } from 'typeorm'

const ID = 'char(36) NOT NULL'
const OPTIONAL_ID = 'char(36) NULL'
const HASH = 'char(64) NOT NULL'
const INSTANT = 'datetime(3) NOT NULL'
const OPTIONS = 'ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci'

const references = (name: string, column: string, table: string, onDelete = 'NO ACTION') =>
  `CONSTRAINT \`${name}\` FOREIGN KEY (\`${column}\`) REFERENCES \`${table}\` (\`id\`) ` +
  `ON DELETE ${onDelete} ON UPDATE NO ACTION`

const tables: Readonly<Record<string, readonly string[]>> = {
  users: [
    `id ${ID}`,
    'email varchar(254) NOT NULL',
    'name varchar(120) NOT NULL',
    'role varchar(20) NOT NULL',
    'disabled tinyint NOT NULL',
    'password_hash varchar(255) NOT NULL',
    'epoch int NOT NULL',
    'version int NOT NULL',
    `created_at ${INSTANT}`,
    'PRIMARY KEY (id)',
    'UNIQUE INDEX users_email (email)',
  ],
  sessions: [
    `id ${HASH}`,
    `user_id ${ID}`,
    'epoch int NOT NULL',
    'user_agent varchar(300) NOT NULL',
    `created_at ${INSTANT}`,
    `seen_at ${INSTANT}`,
    `expires_at ${INSTANT}`,
    'PRIMARY KEY (id)',
    'INDEX sessions_user (user_id)',
    'INDEX sessions_expires (expires_at)',
    references('sessions_user_fk', 'user_id', 'users', 'CASCADE'),
  ],
  sign_in_attempts: [
    `id ${HASH}`,
    'failures int NOT NULL',
    `window_start ${INSTANT}`,
    'PRIMARY KEY (id)',
    'INDEX sign_in_attempts_window (window_start)',
  ],
  heads: [
    `id ${ID}`,
    'name varchar(120) NOT NULL',
    'kind varchar(20) NOT NULL',
    'mechanical_limit double NOT NULL',
    'working_limit double NULL',
    `working_limit_by ${OPTIONAL_ID}`,
    'working_limit_at datetime(3) NULL',
    'working_limit_reason varchar(1000) NULL',
    'kerf double NOT NULL',
    'taper double NOT NULL',
    'standoff double NOT NULL',
    'nozzle_diameter double NOT NULL',
    'version int NOT NULL',
    'PRIMARY KEY (id)',
    'UNIQUE INDEX heads_name (name)',
    references('heads_working_limit_by_fk', 'working_limit_by', 'users'),
  ],
  drawings: [
    `id ${ID}`,
    'file_name varchar(255) NOT NULL',
    'size int NOT NULL',
    `sha256 ${HASH}`,
    'bytes longblob NOT NULL',
    `uploaded_by ${ID}`,
    `uploaded_at ${INSTANT}`,
    'PRIMARY KEY (id)',
    references('drawings_uploaded_by_fk', 'uploaded_by', 'users'),
  ],
  parts: [
    `id ${ID}`,
    'number varchar(60) NOT NULL',
    'name varchar(120) NOT NULL',
    `drawing_id ${ID}`,
    'reading longtext NOT NULL',
    'loops longtext NOT NULL',
    'area double NOT NULL',
    'min_x double NOT NULL',
    'min_y double NOT NULL',
    'max_x double NOT NULL',
    'max_y double NOT NULL',
    `created_by ${ID}`,
    `created_at ${INSTANT}`,
    'version int NOT NULL',
    'PRIMARY KEY (id)',
    'UNIQUE INDEX parts_number (number)',
    'INDEX parts_created_at (created_at)',
    references('parts_drawing_fk', 'drawing_id', 'drawings'),
    references('parts_created_by_fk', 'created_by', 'users'),
  ],
  setups: [
    `id ${ID}`,
    'name varchar(120) NOT NULL',
    `part_id ${ID}`,
    `head_id ${ID}`,
    'state varchar(20) NOT NULL',
    'revision int NOT NULL',
    'approved_revision int NULL',
    'material varchar(120) NOT NULL',
    'thickness double NOT NULL',
    'head_name varchar(120) NOT NULL',
    `saved_by ${ID}`,
    `saved_at ${INSTANT}`,
    `submitted_by ${OPTIONAL_ID}`,
    'submitted_at datetime(3) NULL',
    'version int NOT NULL',
    'PRIMARY KEY (id)',
    'INDEX setups_part (part_id)',
    'INDEX setups_head (head_id)',
    'INDEX setups_state (state)',
    'INDEX setups_saved_at (saved_at)',
    references('setups_part_fk', 'part_id', 'parts'),
    references('setups_head_fk', 'head_id', 'heads'),
    references('setups_saved_by_fk', 'saved_by', 'users'),
    references('setups_submitted_by_fk', 'submitted_by', 'users'),
  ],
  setup_revisions: [
    `setup_id ${ID}`,
    'number int NOT NULL',
    'content longtext NOT NULL',
    `hash ${HASH}`,
    `saved_by ${ID}`,
    `saved_at ${INSTANT}`,
    'PRIMARY KEY (setup_id, number)',
    references('setup_revisions_setup_fk', 'setup_id', 'setups'),
    references('setup_revisions_saved_by_fk', 'saved_by', 'users'),
  ],
  decisions: [
    'id int NOT NULL AUTO_INCREMENT',
    `setup_id ${ID}`,
    'revision int NOT NULL',
    'kind varchar(20) NOT NULL',
    `by_user ${ID}`,
    `at ${INSTANT}`,
    'reason varchar(1000) NOT NULL',
    'meaning varchar(300) NOT NULL',
    `hash ${HASH}`,
    'PRIMARY KEY (id)',
    'INDEX decisions_setup (setup_id, revision)',
    references('decisions_setup_fk', 'setup_id', 'setups'),
    references('decisions_by_fk', 'by_user', 'users'),
  ],
  audit_entries: [
    'id int NOT NULL',
    `at ${INSTANT}`,
    `actor_id ${OPTIONAL_ID}`,
    'actor_name varchar(120) NULL',
    'action varchar(60) NOT NULL',
    'subject_kind varchar(30) NOT NULL',
    'subject_id varchar(64) NOT NULL',
    'subject_label varchar(300) NOT NULL',
    'details longtext NOT NULL',
    `previous_hash ${HASH}`,
    `hash ${HASH}`,
    'PRIMARY KEY (id)',
    'INDEX audit_entries_action (action)',
    'INDEX audit_entries_subject (subject_id)',
    references('audit_entries_actor_fk', 'actor_id', 'users'),
  ],
  audit_chain: ['id int NOT NULL', 'last_id int NOT NULL', `last_hash ${HASH}`, 'PRIMARY KEY (id)'],
  idempotency_keys: [
    `user_id ${ID}`,
    `id ${HASH}`,
    `fingerprint ${HASH}`,
    'answer longtext NOT NULL',
    `created_at ${INSTANT}`,
    'PRIMARY KEY (user_id, id)',
    'INDEX idempotency_keys_created (created_at)',
    references('idempotency_keys_user_fk', 'user_id', 'users', 'CASCADE'),
  ],
}

/** Tables whose rows are never changed nor removed; the database itself refuses. */
const writtenOnce = ['audit_entries', 'decisions', 'setup_revisions', 'drawings']

/** What the first entry of the record names as its predecessor. */
const CHAIN_START = '0'.repeat(64)

export class Ground1764547200000 implements MigrationInterface {
  readonly name = 'Ground1764547200000'

  async up(runner: QueryRunner): Promise<void> {
    for (const [table, lines] of Object.entries(tables)) {
      await runner.query(`CREATE TABLE \`${table}\` (${lines.join(', ')}) ${OPTIONS}`)
    }
    for (const table of writtenOnce) {
      for (const act of ['UPDATE', 'DELETE']) {
        await runner.query(
          `CREATE TRIGGER \`${table}_no_${act.toLowerCase()}\` BEFORE ${act} ON \`${table}\` FOR EACH ROW ` +
            `SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${table} is written once'`,
        )
      }
    }
    await runner.query('INSERT INTO audit_chain (id, last_id, last_hash) VALUES (1, 0, ?)', [CHAIN_START])
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of Object.keys(tables).reverse()) await runner.query(`DROP TABLE \`${table}\``)
  }
}
