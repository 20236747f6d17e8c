// Starts the page.
import { mount } from 'svelte';

import './ui/styles/fonts.css';
import './ui/styles/tokens.css';
import './ui/styles/base.css';
import { startSession } from './app/start';
import App from './ui/shell/App.svelte';

const place = document.getElementById('levelwright');
if (place === null) throw new Error('The page has no element with the id "levelwright".');

async function start(target: HTMLElement): Promise<void> {
  try {
    mount(App, { target, props: { session: await startSession() } });
  } catch (error) {
    // Nothing is there yet that could say it better; what is stored is not touched.
    target.textContent =
      'Levelwright could not start in this browser. Reload the page; if that does not help, try another browser. What is stored stays.';
    throw error;
  }
}

// Not awaited here: with an await at the top level the bundler would not join the scripts that are needed at start.
void start(place);
