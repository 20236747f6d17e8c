// What a browser does with a modal dialog, as far as the dialogs need it: the test's document knows only the element.

/** Gives the test's document `showModal` and `close`. To be called once in a test file. */
export function knowModalDialogs(): void {
  HTMLDialogElement.prototype.showModal = function showModal(this: HTMLDialogElement): void {
    if (this.open) throw new Error('the dialog is open already');
    this.open = true;
  };
  HTMLDialogElement.prototype.close = function close(this: HTMLDialogElement): void {
    this.open = false;
    this.dispatchEvent(new Event('close'));
  };
}
