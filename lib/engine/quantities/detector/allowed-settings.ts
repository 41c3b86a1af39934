import type { SettingName } from '@/lib/engine/contract/settings';

/** Settings of section 3 (two waveforms in one detector). */
export const pairSettings: readonly SettingName[] = [
  'totalMassMsun',
  'massFrame',
  'redshift',
  'distanceMpc',
  'fLowHz',
  'fHighHz',
  'maximise',
  'inclinationRad',
  'azimuthRad',
  'response',
  'modes',
  'lMax',
  'detectors',
  'armAngleDeg',
  'taper',
  'templateMassRange',
];

/** Settings of section 4 (loudness). */
export const loudnessSettings: readonly SettingName[] = [
  'totalMassMsun',
  'massFrame',
  'redshift',
  'distanceMpc',
  'fLowHz',
  'fHighHz',
  'inclinationRad',
  'azimuthRad',
  'response',
  'modes',
  'lMax',
  'average',
  'detectors',
  'armAngleDeg',
  'taper',
  'threshold',
  'cosmology',
];

/** What section 3 lets `over` sweep. */
export const pairSweeps: readonly SettingName[] = [
  'totalMassMsun',
  'fLowHz',
  'fHighHz',
  'redshift',
  'inclinationRad',
  'azimuthRad',
  'taper',
];

/** What section 4 lets `over` sweep. */
export const loudnessSweeps: readonly SettingName[] = [...pairSweeps, 'threshold', 'distanceMpc', 'lMax'];
