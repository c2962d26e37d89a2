import { Inject, Injectable } from '@nestjs/common';
import { studyDefinitionSchema, type Recording } from '@overtally/contracts';
import { schema, type Database } from '@overtally/db';
import { demoPeople, demoProjects } from '@overtally/fixtures';
import { eq, sql } from 'drizzle-orm';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { VerdictsService } from '../limits/verdicts.service.js';
import { InvitationsService } from '../invitations/invitations.service.js';
import { NotesService } from '../notes/notes.service.js';
import { RecordingsService } from '../recordings/recordings.service.js';
import { ReportsService } from '../reports/reports.service.js';
import { StudiesService } from '../studies/studies.service.js';

const { projects, users } = schema;

/** What the analyst of the demonstration has done in the project of current measurements. */
const work = {
  limitSetId: 'iec61000-3-2.classA',
  judged: ['compressor-run.csv', 'led-lamp-14w.csv', 'mixer-supply-165w.csv', 'dimmer-90deg.csv'],
  note: {
    fileName: 'dimmer-90deg.csv',
    target: { kind: 'order', order: 3 },
    text: 'Order 3 is the largest; compare with the capture at 25°.',
    cause: 'Phase control, conduction from 90°',
  },
  recipients: [{ name: 'Priya Castellan', email: 'priya@ostrel-appliances.example' }],
  invited: { email: 'quality@ostrel-appliances.example', role: 'guest' },
  report: {
    title: 'Harmonic currents of compressor RC-210 and hood module HM-1000',
    summary: 'Compressor running, and hood module with phase control at 90°, on the checked supply.',
    of: ['compressor-run.csv', 'dimmer-90deg.csv'],
  },
} as const;

/** A damped filter at the mains side of the hood module, which passes with it. */
const study = {
  of: 'dimmer-90deg.csv',
  name: 'Damped mains filter for hood module HM-1000',
  comment: 'First design',
  assumptions:
    'The module draws the measured current whatever stands in front of it. The supply is a reactor of 10 mH with the mains behind it. The filter’s own current at 50 Hz is not part of the prediction.',
  stage: {
    name: 'Filter between reactor and module',
    isOn: true,
    spec: {
      kind: 'circuit',
      circuit: 'high-pass-filter',
      values: {
        ...{ capacitanceF: 22e-6, inductanceH: 50e-3, coilResistanceOhm: 0.1, dampingResistanceOhm: 22 },
        ...{ sourceInductanceH: 10e-3, sourceResistanceOhm: 0.3 },
      },
    },
    tolerances: [
      { parameter: 'capacitanceF', tolerancePercent: 10 },
      { parameter: 'sourceInductanceH', tolerancePercent: 10 },
    ],
  },
} as const;

interface Place {
  projectId: string;
  analyst: SignedInUser;
  manager: SignedInUser;
}

/** Verdicts, a note, a study, a draft report and an invitation of the demonstration, made the way a person makes them. */
@Injectable()
export class DemoJudgements {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly recordings: RecordingsService,
    private readonly verdicts: VerdictsService,
    private readonly notes: NotesService,
    private readonly reports: ReportsService,
    private readonly studies: StudiesService,
    private readonly invitations: InvitationsService,
  ) {}

  /** Makes them once the captures are analysed; false while some are not. A project with verdicts is left alone. */
  async make(): Promise<boolean> {
    const place = await this.place();
    if (place === undefined) return true;
    const { projectId } = place;
    return this.database.transaction(async (tx) => {
      // Held while the work is done elsewhere, so that a second process does not do it as well.
      await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended('demonstration', 0))`);
      if ((await this.verdicts.list({ projectId }, { limit: 1 })).items.length > 0) return true;
      const captures = await this.captures(projectId);
      if (captures === undefined) return true;
      if (captures.some(({ status }) => status !== 'ready')) {
        return captures.some(({ status }) => status === 'failed');
      }
      await this.work(place, captures);
      return true;
    });
  }

  private async place(): Promise<Place | undefined> {
    const name = demoProjects[0]?.name ?? '';
    const [project] = await this.database
      .select({ id: projects.id })
      .from(projects)
      .where(eq(projects.name, name));
    const [analyst, manager] = await Promise.all([this.person('analyst'), this.person('manager')]);
    return project && analyst && manager && { projectId: project.id, analyst, manager };
  }

  private async person(wanted: 'analyst' | 'manager'): Promise<SignedInUser | undefined> {
    const email = demoPeople.find(({ role }) => role === wanted)?.email ?? '';
    const [person] = await this.database
      .select({ id: users.id, email: users.email, name: users.name, isAdministrator: users.isAdministrator })
      .from(users)
      .where(eq(users.email, email));
    return person;
  }

  /** The captures that are judged; undefined when one was deleted. */
  private async captures(projectId: string): Promise<Recording[] | undefined> {
    const { items } = await this.recordings.page(projectId, { limit: 200, sort: 'number' });
    const found = work.judged.map((fileName) => items.find(({ file }) => file.name === fileName));
    return found.every((recording) => recording !== undefined) ? found : undefined;
  }

  private async work({ projectId, analyst, manager }: Place, captures: Recording[]): Promise<void> {
    const verdictIds = new Map<string, string>();
    for (const { file, channels, latestAnalysisId: analysisId } of captures) {
      const current = channels.find(({ quantity }) => quantity === 'current');
      if (analysisId === null || current === undefined) continue;
      if (file.name === work.note.fileName) {
        const { target, text, cause } = work.note;
        await this.predict(analyst, projectId, { analysisId, channel: current.index, unit: current.unit });
        await this.notes.create(analysisId, analyst.id, { channel: current.index, target, text, cause });
      }
      const { id } = await this.verdicts.create(analyst, analysisId, {
        limitSetId: work.limitSetId,
        channel: current.index,
        parameters: {},
        decisionRule: 'simple-acceptance',
      });
      verdictIds.set(file.name, id);
    }
    const { of, ...words } = work.report;
    const ids = of.flatMap((fileName) => verdictIds.get(fileName) ?? []);
    await this.reports.create(analyst, projectId, {
      ...words,
      verdictIds: ids,
      studyVersionIds: [],
      deviations: '',
      recipients: [...work.recipients],
    });
    await this.invitations.invite(manager, projectId, work.invited);
  }

  /** What a filter would make of the current that fails. */
  private async predict(
    analyst: SignedInUser,
    projectId: string,
    { unit, ...channel }: { analysisId: string; channel: number; unit: string },
  ): Promise<void> {
    const { name, comment, assumptions, stage } = study;
    const definition = studyDefinitionSchema.parse({
      input: { kind: 'channel', ...channel },
      ...{ inputQuantity: 'current', inputUnit: unit, outputQuantity: 'current', outputUnit: unit },
      stages: [stage],
      judgement: { limitSetId: work.limitSetId, parameters: {}, decisionRule: 'simple-acceptance' },
      spread: { method: 'corners' },
      assumptions,
    });
    await this.studies.create(analyst, projectId, { name, definition, comment });
  }
}
