import type { MigrationInterface, QueryRunner } from 'typeorm'

export class Drafts1764633600000 implements MigrationInterface {
  readonly name = 'Drafts1764633600000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(
      'CREATE TABLE `setup_drafts` (' +
        'setup_id char(36) NOT NULL, user_id char(36) NOT NULL, revision int NOT NULL, version int NOT NULL, ' +
        'content longtext NOT NULL, kept_at datetime(3) NOT NULL, PRIMARY KEY (setup_id, user_id), ' +
        'CONSTRAINT `setup_drafts_setup_fk` FOREIGN KEY (`setup_id`) REFERENCES `setups` (`id`) ON DELETE CASCADE ON UPDATE NO ACTION, ' +
        'CONSTRAINT `setup_drafts_user_fk` FOREIGN KEY (`user_id`) REFERENCES `users` (`id`) ON DELETE CASCADE ON UPDATE NO ACTION' +
        ') ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci',
    )
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE `setup_drafts`')
  }
}
