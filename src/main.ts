// Starts the page.
import './ui/styles/fonts.css';

const place = document.getElementById('levelwright');
if (place === null) throw new Error('The page has no element with the id "levelwright".');
const title = document.createElement('h1');
title.textContent = 'Levelwright';
place.append(title);
