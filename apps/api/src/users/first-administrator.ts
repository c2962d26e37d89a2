import { Inject, Injectable, Logger, type OnApplicationBootstrap } from '@nestjs/common';
import type { Database } from '@overtally/db';
import { PasswordHasher } from '../auth/password-hasher.js';
import { AppConfig } from '../config/app-config.js';
import { DATABASE } from '../database/database.tokens.js';
import { UsersRepository } from './users.repository.js';

/** Makes the administrator named in the environment when the installation has none. */
@Injectable()
export class FirstAdministrator implements OnApplicationBootstrap {
  private readonly logger = new Logger(FirstAdministrator.name);

  constructor(
    private readonly config: AppConfig,
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: UsersRepository,
    private readonly hasher: PasswordHasher,
  ) {}

  async onApplicationBootstrap(): Promise<void> {
    const { adminEmail: email, adminPassword: password } = this.config;
    if (email === undefined || password === undefined) return;
    await this.database.transaction(async (tx) => {
      await this.repository.lockAdministrators(tx);
      if ((await this.repository.countEnabledAdministrators(tx)) > 0) return;
      const passwordHash = await this.hasher.hash(password);
      const made = await this.repository.insert(tx, {
        email,
        name: 'Administrator',
        passwordHash,
        isAdministrator: true,
      });
      if (made) this.logger.log('Made the first administrator from ADMIN_EMAIL');
      else this.logger.error('ADMIN_EMAIL has an account that is no administrator; give another address');
    });
  }
}
