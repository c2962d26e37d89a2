import { Inject, Injectable } from '@nestjs/common';
import type { Laboratory, UpdateLaboratory } from '@overtally/contracts';
import { schema, type Database } from '@overtally/db';
import { DATABASE } from '../database/database.tokens.js';

const { laboratory } = schema;
const columns = {
  name: laboratory.name,
  address: laboratory.address,
  contact: laboratory.contact,
  accreditation: laboratory.accreditation,
};

/** The laboratory of the installation, as reports name it. */
@Injectable()
export class LaboratoryService {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** Empty texts until they are entered. */
  async get(): Promise<Laboratory> {
    const [row] = await this.database.select(columns).from(laboratory);
    return row ?? { name: '', address: '', contact: '', accreditation: '' };
  }

  async put(input: UpdateLaboratory): Promise<Laboratory> {
    const set = { ...input, updatedAt: new Date() };
    const [row] = await this.database
      .insert(laboratory)
      .values({ id: 1, ...set })
      .onConflictDoUpdate({ target: laboratory.id, set })
      .returning(columns);
    return row!;
  }
}
