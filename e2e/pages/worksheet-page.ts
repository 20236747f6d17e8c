// The page with a worksheet open: header, account, side panel, banners. What is in the account is the account's own model.
import { readFile } from 'node:fs/promises';

import { expect, type Locator, type Page } from '@playwright/test';

import { Account } from './account';

/** A file as a person would have it on disk. */
export interface NamedFile {
  readonly name: string;
  readonly text: string;
}

/** The whole page. */
export class WorksheetPage {
  readonly account: Account;
  readonly header: Locator;
  readonly title: Locator;
  readonly saveState: Locator;
  readonly banners: Locator;
  readonly working: Locator;
  readonly findings: Locator;
  readonly menu: Locator;
  readonly dialog: Locator;

  constructor(readonly page: Page) {
    this.account = new Account(page);
    this.header = page.getByRole('banner');
    this.title = page.getByRole('textbox', { name: 'Title of the worksheet' });
    this.saveState = this.header.getByText(/^(nothing to save yet|saved here \d\d:\d\d|saving …|NOT saved.*)$/);
    this.banners = page.getByRole('status').or(page.getByRole('alert'));
    this.working = page.getByRole('complementary', { name: 'Working' });
    this.findings = page.getByRole('complementary', { name: 'Findings' });
    this.menu = page.getByRole('menu');
    this.dialog = page.getByRole('dialog');
  }

  /** Opens the page and waits until it stands. */
  async open(): Promise<this> {
    await this.page.goto('/');
    await this.expectReady();
    return this;
  }

  /** Expects that the account is there and has the cursor. */
  async expectReady(): Promise<void> {
    await expect(this.account.grid).toBeVisible();
    await this.account.expectOneTabStop();
  }

  /** A button of the header. */
  button(name: string | RegExp): Locator {
    return this.header.getByRole('button', { name, exact: true });
  }

  /** The button that tells how many findings there are. */
  get findingsButton(): Locator {
    return this.button(/^(No findings|\d+ (error|warning|note).*)$/);
  }

  /** Waits until the page says that everything is in the browser's storage. */
  async expectSaved(): Promise<void> {
    await expect(this.saveState).toHaveText(/^saved here/);
  }

  /** Chooses an item of the header's menu of further things. */
  async chooseMore(item: string | RegExp): Promise<void> {
    await this.button('More').click();
    await this.menu.getByRole('menuitem', { name: item }).click();
  }

  /** Opens a starter from the help of an empty worksheet. */
  async beginFromStarter(title: string): Promise<void> {
    await this.page.getByRole('region', { name: 'How to begin' }).getByRole('button', { name: title }).click();
    await expect(this.title).toHaveValue(title);
    await this.expectSaved();
  }

  /** Saves the worksheet as a file and gives the file. */
  async saveAsFile(button: Locator = this.button('Save file')): Promise<NamedFile> {
    const coming = this.page.waitForEvent('download');
    await button.click();
    const download = await coming;
    return { name: download.suggestedFilename(), text: await readFile(await download.path(), 'utf8') };
  }

  /** Chooses a file in the browser's own dialog, which the header's button opens. */
  async openFile({ name, text }: NamedFile): Promise<void> {
    const coming = this.page.waitForEvent('filechooser');
    await this.button('Open file').click();
    const chooser = await coming;
    await chooser.setFiles({ name, mimeType: 'application/json', buffer: Buffer.from(text, 'utf8') });
  }

  /** Opens a file and waits until the page shows it. */
  async openFileOf(title: string, file: NamedFile): Promise<void> {
    await this.openFile(file);
    await expect(this.title).toHaveValue(title);
  }

  /** Drags a file from elsewhere on the page and lets it go there. */
  async dropFile(path: string): Promise<void> {
    const box = await this.account.grid.boundingBox();
    if (box === null) throw new Error('The account is not to be seen.');
    const place = { x: Math.round(box.x + box.width / 2), y: Math.round(box.y + box.height / 2) };
    const data = { items: [], files: [path], dragOperationsMask: 1 };
    const protocol = await this.page.context().newCDPSession(this.page);
    for (const type of ['dragEnter', 'dragOver', 'drop'] as const) {
      await protocol.send('Input.dispatchDragEvent', { type, ...place, data });
    }
    await protocol.detach();
  }

  /** Shows a side panel that is not shown. */
  async showFindings(): Promise<Locator> {
    if ((await this.findingsButton.getAttribute('aria-pressed')) !== 'true') await this.findingsButton.click();
    await expect(this.findings).toBeVisible();
    return this.findings;
  }

  /** Shows the working. */
  async showWorking(): Promise<Locator> {
    const button = this.button('Working');
    if ((await button.getAttribute('aria-pressed')) !== 'true') await button.click();
    await expect(this.working).toBeVisible();
    return this.working;
  }

  /** Opens the list of worksheets. */
  async showWorksheets(): Promise<WorksheetsDialog> {
    await this.button('Worksheets').click();
    const dialog = new WorksheetsDialog(this.page);
    await expect(dialog.dialog).toBeVisible();
    return dialog;
  }
}

/** The dialog that lists the worksheets of this browser. */
export class WorksheetsDialog {
  readonly dialog: Locator;
  readonly entries: Locator;

  constructor(page: Page) {
    this.dialog = page.getByRole('dialog', { name: 'Worksheets' });
    this.entries = this.dialog.getByRole('region', { name: 'Kept in this browser' }).getByRole('listitem');
  }

  /** Begins a new worksheet; the dialog closes. */
  async begin(): Promise<void> {
    // A worksheet that has not been named yet is listed under the same words, further down.
    await this.dialog.getByRole('button', { name: 'New worksheet', exact: true }).first().click();
    await expect(this.dialog).toBeHidden();
  }

  /** The entry of a worksheet. */
  entry(title: string): Locator {
    return this.entries.filter({ has: this.dialog.page().getByRole('group', { name: `“${title}”`, exact: true }) });
  }

  /** One of the things that can be done with a worksheet. */
  action(word: 'Rename' | 'Duplicate' | 'Earlier states of' | 'Delete', title: string): Locator {
    return this.dialog.getByRole('button', { name: `${word} “${title}”`, exact: true });
  }
}
