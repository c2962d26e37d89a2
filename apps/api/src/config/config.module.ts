import { Global, Module, type DynamicModule } from '@nestjs/common';
import { AppConfig } from './app-config.js';

@Global()
@Module({})
export class ConfigModule {
  static with(config: AppConfig): DynamicModule {
    return {
      module: ConfigModule,
      providers: [{ provide: AppConfig, useValue: config }],
      exports: [AppConfig],
    };
  }
}
