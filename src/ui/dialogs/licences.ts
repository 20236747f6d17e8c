/** What the page is made of besides its own code, with the licences that its parts come under. The texts are served with it. */

/** A part of the page that others made, or the page itself. */
export interface LicensedPart {
  readonly name: string;
  /** What it does here. */
  readonly part: string;
  /** SPDX expression. */
  readonly licence: string;
  /** Address of the licence's text, relative to the page. */
  readonly text: string;
}

/** The page's own licence. */
export const OWN_LICENCE: LicensedPart = {
  name: 'Levelwright',
  part: 'the page itself',
  licence: 'MIT',
  text: 'licences/levelwright.txt',
};

/** The fonts. The served ones are subsets under names of our own, as their licence asks for. */
export const FONTS: readonly LicensedPart[] = [
  { name: 'Source Sans 3', part: 'text and figures', licence: 'OFL-1.1', text: 'licences/source-sans-3.txt' },
  { name: 'STIX Two Text', part: 'symbols', licence: 'OFL-1.1', text: 'licences/stix-two-text.txt' },
  { name: 'JetBrains Mono', part: 'entries', licence: 'OFL-1.1', text: 'licences/jetbrains-mono.txt' },
];

/** The libraries inside the page's script. */
export const LIBRARIES: readonly LicensedPart[] = [
  { name: 'Svelte', part: 'the screen', licence: 'MIT', text: 'licences/svelte.txt' },
  {
    name: 'hot-formula-parser',
    part: 'the grammar of expressions',
    licence: 'MIT',
    text: 'licences/hot-formula-parser.txt',
  },
  { name: 'Dexie', part: 'storage in the browser', licence: 'Apache-2.0', text: 'licences/dexie.txt' },
  { name: 'Valibot', part: 'checking of files', licence: 'MIT', text: 'licences/valibot.txt' },
];
