import { Module } from '@nestjs/common';
import { UsersModule } from '../users/users.module.js';
import { MembersController } from './members.controller.js';
import { MembersRepository } from './members.repository.js';
import { MembersService } from './members.service.js';
import { ProjectsController } from './projects.controller.js';
import { ProjectsRepository } from './projects.repository.js';
import { ProjectsService } from './projects.service.js';

@Module({
  imports: [UsersModule],
  controllers: [ProjectsController, MembersController],
  providers: [ProjectsService, ProjectsRepository, MembersService, MembersRepository],
  exports: [ProjectsService, MembersService],
})
export class ProjectsModule {}
