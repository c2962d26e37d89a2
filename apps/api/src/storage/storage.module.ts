import { Global, Module } from '@nestjs/common';
import { join } from 'node:path';
import { AppConfig } from '../config/app-config.js';
import { DiskStorage } from './disk-storage.js';
import { Storage } from './storage.js';

@Global()
@Module({
  providers: [
    {
      provide: Storage,
      inject: [AppConfig],
      useFactory: async (config: AppConfig): Promise<Storage> => {
        const storage = new DiskStorage(join(config.dataDir, 'storage'));
        await storage.prepare();
        return storage;
      },
    },
  ],
  exports: [Storage],
})
export class StorageModule {}
