// Starts the page.
import { mount } from 'svelte';

import './ui/styles/fonts.css';
import './ui/styles/tokens.css';
import './ui/styles/base.css';
import { startSession } from './app/start';
import App from './ui/shell/App.svelte';

const place = document.getElementById('levelwright');
if (place === null) throw new Error('The page has no element with the id "levelwright".');

try {
  mount(App, { target: place, props: { session: await startSession() } });
} catch (error) {
  // Nothing is there yet that could say it better; what is stored is not touched.
  place.textContent =
    'Levelwright could not start in this browser. Reload the page; if that does not help, try another browser. What is stored stays.';
  throw error;
}
