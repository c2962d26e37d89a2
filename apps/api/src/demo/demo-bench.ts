import { Injectable } from '@nestjs/common';
import type { CreateCalibration, CreateEquipment, CreateInstrument } from '@overtally/contracts';
import { demoProjects } from '@overtally/fixtures';
import { EquipmentService } from '../equipment/equipment.service.js';
import { CalibrationsService } from '../instruments/calibrations.service.js';
import { ChainsService } from '../instruments/chains.service.js';
import { InstrumentsService } from '../instruments/instruments.service.js';
import { LaboratoryService } from '../laboratory/laboratory.service.js';
import type { UploadFields } from '../recordings/dto/upload.dto.js';
import type { PendingCapture } from './demo-accounts.js';

type Said = Pick<UploadFields, 'equipmentId' | 'operatingModeId' | 'measuringChainId' | 'conditions'>;
type DemoInstrument = Pick<CreateInstrument, 'kind' | 'name' | 'model' | 'serialNumber'>;

const laboratory = {
  name: 'Brackwater test laboratory',
  address: 'Tide Lane 4, Brackwater',
  contact: 'desk@brackwater-lab.example',
  accreditation: '',
};

const probe: DemoInstrument = {
  ...{ kind: 'voltage-transducer', name: 'Differential probe 1:100', model: 'DP-100', serialNumber: '2209' },
};
const clamp: DemoInstrument = {
  ...{ kind: 'current-transducer', name: 'Current clamp 20 A', model: 'CC-20', serialNumber: '1153' },
};
const benchFour: DemoInstrument = {
  ...{ kind: 'recorder', name: 'Bench recorder 4', model: 'BR-8', serialNumber: '0417' },
};
const benchSix: DemoInstrument = {
  ...{ kind: 'recorder', name: 'Bench recorder 6', model: 'BR-8', serialNumber: '0582' },
};

const singlePhase = { name: 'Bench 4, single phase', instruments: [probe, clamp, benchFour] };
const threePhases = { name: 'Bench 6, three phases', instruments: [benchSix] };

const compressor: Pick<CreateEquipment, 'name' | 'model' | 'serialNumber' | 'ratings' | 'operatingModes'> = {
  ...{ name: 'Refrigerator compressor', model: 'RC-210', serialNumber: '26-00118' },
  ratings: { voltageV: 230, frequencyHz: 50, phases: 1, powerW: 210, currentA: 1.2, emissionClass: 'A' },
  operatingModes: [
    { name: 'Running', description: 'Steady, after five minutes', retired: false },
    { name: 'Standby', description: '', retired: false },
  ],
};
const hoodModule: typeof compressor = {
  ...{ name: 'Hood module', model: 'HM-1000', serialNumber: '26-00561' },
  ratings: { voltageV: 230, frequencyHz: 50, phases: 1, powerW: 1000, emissionClass: 'A' },
  operatingModes: [
    { name: 'Phase control at 25°', description: '', retired: false },
    { name: 'Phase control at 90°', description: '', retired: false },
  ],
};

/** What some of the captures are of; the others keep their words alone. */
const said: Record<string, { piece?: typeof compressor; mode?: number; chain: typeof singlePhase }> = {
  'compressor-run.csv': { piece: compressor, mode: 0, chain: singlePhase },
  'dimmer-25deg.csv': { piece: hoodModule, mode: 0, chain: singlePhase },
  'dimmer-90deg.csv': { piece: hoodModule, mode: 1, chain: singlePhase },
  'pump-drive-three-phase.csv': { chain: threePhases },
};
const conditions = {
  ...{ ambientTemperatureC: 22.5, relativeHumidityPercent: 46, supplyVoltageV: 230, supplyFrequencyHz: 50 },
  ...{ supply: 'power source', place: 'Bay 2' },
};

const day = (offset: number) => new Date(Date.now() + offset * 24 * 3600 * 1000).toISOString().slice(0, 10);

/** Laboratory, instruments, chains and equipment of the demonstration, made the way people make them. */
@Injectable()
export class DemoBench {
  constructor(
    private readonly laboratory: LaboratoryService,
    private readonly instruments: InstrumentsService,
    private readonly calibrations: CalibrationsService,
    private readonly chains: ChainsService,
    private readonly equipment: EquipmentService,
  ) {}

  /** What goes with a capture; makes what it names where it is not there yet. */
  async saidOf({ projectId, uploadedById, capture }: PendingCapture): Promise<Said> {
    const named = said[capture.fileName];
    const isOfFirst = demoProjects[0]?.captures.some(({ fileName }) => fileName === capture.fileName);
    if (named === undefined || !isOfFirst) return {};
    const measuringChainId = await this.chain(named.chain, uploadedById);
    if (named.piece === undefined) return { measuringChainId, conditions };
    const piece = await this.piece(projectId, uploadedById, named.piece);
    const mode = piece.operatingModes[named.mode ?? 0];
    return { equipmentId: piece.id, operatingModeId: mode?.id, measuringChainId, conditions };
  }

  /** Names the laboratory where nobody has named it. */
  async nameLaboratory(): Promise<void> {
    const { name } = await this.laboratory.get();
    if (name === '') await this.laboratory.put(laboratory);
  }

  private async chain({ name, instruments }: typeof singlePhase, userId: string): Promise<string> {
    const { items } = await this.chains.page({ q: name, limit: 1 });
    if (items[0] !== undefined) return items[0].id;
    const instrumentIds: string[] = [];
    for (const instrument of instruments) instrumentIds.push(await this.instrument(instrument, userId));
    return (await this.chains.create(userId, { name, description: '', instrumentIds })).id;
  }

  private async instrument(given: DemoInstrument, userId: string): Promise<string> {
    const { items } = await this.instruments.page({ q: given.serialNumber, limit: 1 });
    if (items[0] !== undefined) return items[0].id;
    const { id } = await this.instruments.create(userId, {
      ...{ ...given, manufacturer: 'Vessel & Orrel', remark: '', responsibleId: userId },
    });
    // One stands overdue whenever the demonstration is made; the captures that are judged do not depend on it.
    const days =
      given === benchSix
        ? { calibratedOn: day(-385), dueOn: day(-20) }
        : { calibratedOn: '2026-03-12', dueOn: '2027-03-12' };
    const calibration: CreateCalibration = {
      ...days,
      certificateNumber: `BW-${given.serialNumber}`,
      calibratedBy: 'Calibration room, Brackwater',
      uncertainty: '0.2 % (k = 2)',
      remark: '',
    };
    await this.calibrations.create(id, userId, calibration);
    return id;
  }

  private async piece(projectId: string, userId: string, given: typeof compressor) {
    const { items } = await this.equipment.page(projectId, { q: given.serialNumber, limit: 1 });
    if (items[0] !== undefined) return items[0];
    const rest = { manufacturer: 'Ostrel', receivedOn: '2026-10-05', remark: '' };
    return this.equipment.create(projectId, userId, { ...given, ...rest });
  }
}
