/** Kinds and sides assumed from names: only where the name is unmistakable, and only what the unit can be. */
import { describe, expect, it } from 'vitest';
import { assumeFromName, findUnit, type Unit } from '../../src/quantity';

const unit = (word: string): Unit => {
  const found = findUnit(word);
  if (found === undefined) throw new Error(`no unit ${word}`);
  return found;
};

const assumed = (symbol: string, label: string, word: string): string => {
  const found = assumeFromName(symbol, label, unit(word));
  return found === undefined ? 'nothing' : [found.kind, found.side].filter((part) => part !== undefined).join(', ');
};

describe('from the symbol', () => {
  it.each([
    ['NF', 'dB', 'noise figure'],
    ['NF_2', 'dB', 'noise figure'],
    ['NF1', 'dB', 'noise figure'],
    ['L_feed', 'dB', 'loss'],
    ['L', 'dB', 'loss'],
    ['L2', 'dB', 'loss'],
    ['FSPL', 'dB', 'loss'],
    ['ACLR', 'dB', 'loss'],
    ['ACS_1', 'dB', 'loss'],
    ['A_rain', 'dB', 'loss'],
    ['G_tx', 'dB', 'gain'],
    ['G', 'dB', 'gain'],
    ['SNR', 'dB', 'signal ratio'],
    ['SNR_req', 'dB', 'signal ratio'],
    ['CNR', 'dB', 'signal ratio'],
    ['C_N', 'dB', 'signal ratio'],
    ['C_I', 'dB', 'signal ratio'],
    ['SIR', 'dB', 'signal ratio'],
    ['SINR_2', 'dB', 'signal ratio'],
    ['EbN0', 'dB', 'signal ratio'],
    ['Eb_N0', 'dB', 'signal ratio'],
    ['EsN0_req', 'dB', 'signal ratio'],
    ['CN0', 'dBHz', 'signal ratio'],
    ['C_N0', 'dBHz', 'signal ratio'],
    ['EVM', 'dB', 'impairment ratio'],
    ['EVM_tx', 'dB', 'impairment ratio'],
    ['spur', 'dB', 'impairment ratio'],
    ['N', 'dBm', 'level, unwanted'],
    ['N_0', 'dBm/Hz', 'level, unwanted'],
    ['I_ferry', 'dBm', 'level, unwanted'],
    ['S', 'dBm', 'level, wanted'],
    ['C', 'dBW', 'level, wanted'],
    ['N', 'W', 'level, unwanted'],
    // Names that are near and say nothing for certain.
    ['NFC', 'dB', 'nothing'],
    ['Lambda', 'dB', 'nothing'],
    ['len', 'dB', 'nothing'],
    ['GT', 'dB', 'nothing'],
    ['gain', 'dB', 'nothing'],
    ['margin', 'dB', 'nothing'],
    ['SNR_margin', 'dB', 'nothing'],
    ['SNR_loss', 'dB', 'nothing'],
    ['SNR_gap', 'dB', 'nothing'],
    ['dSNR', 'dB', 'nothing'],
    ['I_N', 'dB', 'nothing'],
    ['INR', 'dB', 'nothing'],
    ['P_tx', 'dBm', 'nothing'],
    ['Nx', 'dBm', 'nothing'],
    ['P', 'dB', 'nothing'],
    ['', 'dB', 'nothing'],
    // Names that the unit forbids.
    ['NF', 'dBm', 'nothing'],
    ['L_1', 'm', 'nothing'],
    ['L_1', 'dBm', 'nothing'],
    ['G', 'dBi', 'nothing'],
    ['N', 'dB', 'nothing'],
    ['S', 'dB', 'nothing'],
    ['C', '1', 'nothing'],
    ['SNR', '1', 'nothing'],
    ['EVM', '%', 'nothing'],
    ['N', '1', 'nothing'],
    ['I', 'mA', 'nothing'],
    ['L', 'dB/km', 'nothing'],
  ])('%s in %s: %s', (symbol, word, expected) => {
    expect(assumed(symbol, '', word)).toBe(expected);
  });
});

describe('from the label', () => {
  it.each([
    ['Feeder loss', 'dB', 'loss'],
    ['Losses of the radome', 'dB', 'loss'],
    ['Rain attenuation', 'dB', 'loss'],
    ['Adjacent-channel rejection', 'dB', 'loss'],
    ['Isolation between ports', 'dB', 'loss'],
    ['Antenna gain', 'dB', 'gain'],
    ['Noise figure of the receiver', 'dB', 'noise figure'],
    ['Signal-to-noise ratio', 'dB', 'signal ratio'],
    ['C/N uplink', 'dB', 'signal ratio'],
    ['Required Eb/N0', 'dB', 'signal ratio'],
    ['C/N₀ at the station', 'dBHz', 'signal ratio'],
    ['EVM of the modulator', 'dB', 'impairment ratio'],
    ['Thermal noise', 'dBm', 'level, unwanted'],
    ['Interference from the ferry', 'dBm', 'level, unwanted'],
    ['Wanted signal', 'dBm', 'level, wanted'],
    ['Carrier at the input', 'dBW', 'level, wanted'],
    // Two words of different kinds, or a margin.
    ['Gain less losses', 'dB', 'nothing'],
    ['Loss of signal-to-noise ratio', 'dB', 'nothing'],
    ['Fade margin', 'dB', 'nothing'],
    ['Margin on antenna gain', 'dB', 'nothing'],
    ['Noise rise', 'dB', 'nothing'],
    ['SNR improvement', 'dB', 'nothing'],
    ['Noise and wanted signal', 'dBm', 'nothing'],
    ['Glossy finish', 'dB', 'nothing'],
    ['Again', 'dB', 'nothing'],
    ['Transmit power', 'dBm', 'nothing'],
    ['Antenna gain', 'dBm', 'nothing'],
  ])('“%s” in %s: %s', (label, word, expected) => {
    expect(assumed('x', label, word)).toBe(expected);
  });

  it('counts for less than the symbol', () => {
    expect(assumed('G_1', 'Feeder loss', 'dB')).toBe('gain');
  });
});
