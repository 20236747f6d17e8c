/**
 * starters: worked example worksheets in invented settings, each kept as the canonical text of its file.
 * Holds: every starter reads without a message, is free of errors and warnings, and its figures are those that
 * `test/golden/starters` derives by hand. Opening one makes a copy with an id of its own: that is the caller's work.
 */
import harbourBuoyUplink from './harbour-buoy-uplink.budget.json?raw';
import ridgeToRidgeHop from './ridge-to-ridge-hop.budget.json?raw';
import satelliteGroundStation from './satellite-ground-station.budget.json?raw';
import smallSatelliteDownlink from './small-satellite-downlink.budget.json?raw';
import twoConversionReceiver from './two-conversion-receiver.budget.json?raw';

/** An example to begin from. */
export interface Starter {
  readonly id: string;
  /** Title and summary are those of the worksheet, here so that a list need not read it. */
  readonly title: string;
  readonly summary: string;
  /** The worksheet file, as text. */
  readonly text: string;
}

/** The starters, in the order in which a list shows them. */
export const STARTERS: readonly Starter[] = [
  {
    id: 'harbour-buoy-uplink',
    title: 'Harbour buoy uplink',
    summary:
      'Signal to noise and interference of a buoy that shares its band with a ferry, a crane and storm pumps in the harbour of Orrasund. Place, parts and figures are invented.',
    text: harbourBuoyUplink,
  },
  {
    id: 'ridge-to-ridge-hop',
    title: 'Microwave hop between two ridges',
    summary:
      'C/N, C/I and fade margin of a fixed hop from Varnholt Ridge to Ollin Scar, in clear air and in heavy rain. Ridges, radios and figures are invented.',
    text: ridgeToRidgeHop,
  },
  {
    id: 'small-satellite-downlink',
    title: 'Small satellite downlink',
    summary:
      'G/T, C/N₀ and Eb/N₀ from the satellite Larkmote to a three-metre dish at Oskerrin, at the zenith and low over the horizon. Satellite, station and figures are invented.',
    text: smallSatelliteDownlink,
  },
  {
    id: 'two-conversion-receiver',
    title: 'Receiver with two conversions',
    summary:
      'Gain, noise, intercepts and headroom along the receiver of the relay on Fennock Knoll, in a quiet band and beside strong neighbours. Place, parts and figures are invented.',
    text: twoConversionReceiver,
  },
  {
    id: 'satellite-ground-station',
    title: 'Satellite ground station',
    summary:
      'G/T, C/N₀ and Eb/N₀ of the station at Skelderhaugh under an imaging satellite, on a high pass in clear air and on a low one in rain. Satellite, station and figures are invented.',
    text: satelliteGroundStation,
  },
];
