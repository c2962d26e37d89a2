import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, eq, isNull, sql } from 'drizzle-orm';
import type { z } from 'zod';
import { AppConfig } from '../../config/app-config.js';
import { DATABASE } from '../../database/database.tokens.js';
import { calibrationNoticesJob } from '../../jobs/definitions/calibration-notices.job.js';
import type { JobHandler } from '../../jobs/job-handler.js';
import { MailsService } from '../../mails/mails.service.js';
import { InstrumentsService, type DueInstrument } from '../instruments.service.js';

const { users } = schema;

type Payload = z.infer<typeof calibrationNoticesJob.payload>;

const DAYS_AHEAD = 30;

interface Addressee {
  name: string;
  email: string;
}

/** Tells who is responsible for an instrument, else the administrators, that its calibration ends; once of each. */
@Injectable()
export class CalibrationNoticesHandler implements JobHandler<Payload> {
  readonly definition = calibrationNoticesJob;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly config: AppConfig,
    private readonly instruments: InstrumentsService,
    private readonly mails: MailsService,
  ) {}

  async run(): Promise<void> {
    await this.database.transaction(async (tx) => {
      // Two runs at the same time must not both tell of a calibration.
      await tx.execute(
        sql`select pg_advisory_xact_lock(hashtextextended('overtally.calibration-notices', 0))`,
      );
      const due = await this.instruments.dueSoon(DAYS_AHEAD);
      if (due.length === 0) return;
      const administrators = due.some(({ responsible }) => !responsible) ? await administratorsOf(tx) : [];
      const byPerson = new Map<string, { to: Addressee; due: DueInstrument[] }>();
      for (const one of due) {
        for (const { name, email } of one.responsible ? [one.responsible] : administrators) {
          const entry = byPerson.get(email) ?? { to: { name, email }, due: [] };
          entry.due.push(one);
          byPerson.set(email, entry);
        }
      }
      for (const { to, due: own } of byPerson.values()) await this.tell(tx, to, own);
      const told = due.filter(({ responsible }) => responsible !== null || administrators.length > 0);
      await this.instruments.markDueNoticeSent(
        tx,
        told.map(({ calibration }) => calibration.id),
      );
    });
  }

  /** The run of the next day does the same. */
  giveUp(): Promise<void> {
    return Promise.resolve();
  }

  private async tell(tx: Tx, to: Addressee, due: readonly DueInstrument[]): Promise<void> {
    const today = new Date().toISOString().slice(0, 10);
    const overdue = due.filter(({ calibration }) => calibration.dueOn < today).length;
    const count = due.length === 1 ? '1 instrument' : `${due.length} instruments`;
    await this.mails.enqueue(tx, {
      kind: 'calibration-due',
      to,
      subject: `Calibration due: ${count}`,
      message: {
        heading: `Calibration is due: ${count}`,
        facts: overdue === 0 ? [] : [['Overdue already', String(overdue)]],
        paragraphs: ['Reports about measurements after these days are not issued without a stated reason.'],
        items: due.map((one) => itemOf(one, today)),
        action: { label: 'Open the instruments', href: `${this.config.publicUrl}/instruments` },
        reason:
          'You get this message because you are responsible for these instruments, or administer the installation and nobody else is.',
      },
    });
  }
}

function itemOf({ instrument, calibration }: DueInstrument, today: string): string {
  const { name, manufacturer, model, serialNumber } = instrument;
  const make = [manufacturer, model].filter(Boolean).join(' ');
  const state = calibration.dueOn < today ? 'overdue since' : 'due on';
  return `${name}${make ? ` (${make})` : ''}, serial number ${serialNumber}: ${state} ${calibration.dueOn}`;
}

function administratorsOf(tx: Tx): Promise<Addressee[]> {
  return tx
    .select({ name: users.name, email: users.email })
    .from(users)
    .where(and(eq(users.isAdministrator, true), isNull(users.disabledAt)));
}
