// Starts the page.
import { mount } from 'svelte';

import './ui/styles/fonts.css';
import './ui/styles/tokens.css';
import './ui/styles/base.css';
import { startSession } from './app/start';
import App from './ui/shell/App.svelte';

const place = document.getElementById('levelwright');
if (place === null) throw new Error('The page has no element with the id "levelwright".');
mount(App, { target: place, props: { session: await startSession() } });
