// What the page has said to be saved is there after the browser was killed without warning.
import { expect } from './fixtures';
import { profileTest } from './own-browser';

profileTest('every edit that was said to be saved is there after the browser was killed', async ({ startAgain }) => {
  const sheet = await startAgain();
  const { account } = sheet;
  await account.draft('P_tx', 'Transmit power', '33 dBm');
  await account.draft('L', 'Loss of the path', '120 dB');
  await account.draft('P_rx', 'Level at the receiver', 'P_tx - L');
  await sheet.title.fill('Cable car telemetry');
  await sheet.title.press('Enter');
  await sheet.expectSaved();
  const first = await account.readAll();
  expect(first.map(({ figures }) => figures[0])).toEqual(['33.00 dBm', '120.00 dB', '−87.00 dBm']);

  const again = await startAgain();
  await expect(again.title).toHaveValue('Cable car telemetry');
  expect(await again.account.readAll()).toEqual(first);

  // And once more, after an edit of what had come back.
  await again.account.retype('L', 'entry', '118.5 dB');
  await expect(again.account.figure('P_rx')).toHaveText('−85.50 dBm');
  await again.expectSaved();

  const third = await startAgain();
  await expect(third.account.cell('L', 'entry')).toHaveText('118.5 dB');
  await expect(third.account.figure('P_rx')).toHaveText('−85.50 dBm');
});

profileTest('five times killed right after an edit was said to be saved: none is lost', async ({ startAgain }) => {
  const sheet = await startAgain();
  await sheet.account.draft('x', 'Counter', '0 dB');
  await sheet.expectSaved();
  let running = sheet;
  for (let round = 1; round <= 5; round++) {
    await running.account.retype('x', 'entry', `${String(round)} dB`);
    await running.expectSaved();
    running = await startAgain();
    await expect(running.account.cell('x', 'entry')).toHaveText(`${String(round)} dB`);
  }
});
