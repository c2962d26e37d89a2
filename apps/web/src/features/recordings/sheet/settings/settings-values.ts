import { settingsSchema, type Channel, type Settings } from '@overtally/contracts';
import { DEFAULT_THD_ORDER } from '@overtally/dsp';
import { numberOf, numberText } from '../../../../lib/number-text.js';
import { pairingSettings, toPairing } from './pairing-values.js';
import { nominalChoices, type SettingsForm } from './settings-form.js';

type Described = Pick<Channel, 'index' | 'name' | 'quantity' | 'unit'>;

const text = (value: number | undefined) => (value === undefined ? '' : String(value));

/**
 * Form values of earlier settings of a recording with these channels; the part in view is offered as the span. A stored
 * default of the orders of THD is left to the engine, so that it follows the profile.
 */
export function toSettingsForm(
  settings: Settings,
  view: { fromS: number; toS: number },
  channels: readonly Described[],
): SettingsForm {
  const { profile, thdMaxOrder, bandHz, accuracy } = settings;
  const known = nominalChoices.find((choice) => choice === String(settings.nominalFrequencyHz));
  const span = settings.span ?? view;
  return {
    profile,
    nominal: known ?? 'other',
    nominalOtherHz: known ? '' : String(settings.nominalFrequencyHz),
    maxOrder: text(settings.maxOrder),
    thdMaxOrder: thdMaxOrder === DEFAULT_THD_ORDER[profile] ? '' : text(thdMaxOrder),
    cyclesPerWindow: text(settings.cyclesPerWindow),
    bandFromHz: text(bandHz?.fromHz),
    bandToHz: text(bandHz?.toHz),
    window: settings.window ?? '',
    kaiserBeta: text(settings.kaiserBeta),
    segmentLength: text(settings.segmentLength),
    overlapPercent: text(settings.overlapPercent),
    ...toPairing(settings, channels),
    ratedCurrentA: text(settings.ratedCurrentA),
    accuracy: channels.map(({ index, name }) => {
      const stated = accuracy?.find(({ channel }) => channel === index);
      return {
        ...{ channel: index, name },
        readingPercent: text(stated?.readingPercent),
        calibrationPercent: text(stated?.calibrationPercent),
      };
    }),
    extent: settings.span ? 'part' : 'whole',
    fromS: numberText(span.fromS),
    toS: numberText(span.toS),
  };
}

/** Settings to send: of what only one profile uses, that which the chosen one does. */
export function toSettings(values: SettingsForm): Settings {
  const { profile, nominal, extent } = values;
  return settingsSchema.parse({
    profile,
    nominalFrequencyHz:
      nominal === 'auto' ? 'auto' : numberOf(nominal === 'other' ? values.nominalOtherHz : nominal),
    maxOrder: numberOf(values.maxOrder),
    thdMaxOrder: numberOf(values.thdMaxOrder),
    window: values.window || undefined,
    kaiserBeta: values.window === 'kaiser' ? numberOf(values.kaiserBeta) : undefined,
    ...profileSettings(values),
    accuracy: accuracySettings(values.accuracy),
    span: extent === 'part' ? { fromS: numberOf(values.fromS), toS: numberOf(values.toS) } : undefined,
  });
}

function profileSettings(values: SettingsForm): Partial<Settings> {
  const power = { ...pairingSettings(values), ratedCurrentA: numberOf(values.ratedCurrentA) };
  switch (values.profile) {
    case 'mains':
      return { ...power, cyclesPerWindow: numberOf(values.cyclesPerWindow) };
    case 'general':
      return {
        ...power,
        segmentLength: numberOf(values.segmentLength),
        overlapPercent: numberOf(values.overlapPercent),
      };
    case 'tone': {
      const [fromHz, toHz] = [numberOf(values.bandFromHz), numberOf(values.bandToHz)];
      return fromHz === undefined || toHz === undefined ? {} : { bandHz: { fromHz, toHz } };
    }
  }
}

/** Channels of whose measuring chain something is stated; null, not zero, where nothing is. */
function accuracySettings(rows: SettingsForm['accuracy']): Settings['accuracy'] {
  const stated = rows.flatMap(({ channel, readingPercent, calibrationPercent }) => {
    const [reading, calibration] = [numberOf(readingPercent), numberOf(calibrationPercent)];
    if (reading === undefined && calibration === undefined) return [];
    return [{ channel, readingPercent: reading ?? 0, calibrationPercent: calibration ?? 0 }];
  });
  return stated.length > 0 ? stated : undefined;
}
