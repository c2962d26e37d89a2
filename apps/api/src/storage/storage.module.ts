import { Global, Module } from '@nestjs/common';
import { AppConfig } from '../config/app-config.js';
import { openStorage } from './open-storage.js';
import { Storage } from './storage.js';

@Global()
@Module({
  providers: [
    {
      provide: Storage,
      inject: [AppConfig],
      useFactory: async (config: AppConfig): Promise<Storage> => {
        const storage = await openStorage(config.storage);
        await storage.prepare();
        return storage;
      },
    },
  ],
  exports: [Storage],
})
export class StorageModule {}
