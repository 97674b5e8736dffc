/**
 * Puts text on the clipboard and says whether it got there. Browsers keep the clipboard from pages served over
 * plain http, as in a listening room; there the text is selected in a hidden area and copied by command.
 */
export async function copyText(text: string): Promise<boolean> {
  if (window.isSecureContext) {
    return navigator.clipboard.writeText(text).then(
      () => true,
      () => copyBySelection(text),
    );
  }
  return copyBySelection(text);
}

function copyBySelection(text: string): boolean {
  const focused = document.activeElement;
  const area = document.createElement('textarea');
  area.value = text;
  area.readOnly = true;
  area.style.position = 'fixed';
  area.style.opacity = '0';
  (focused?.closest('[role="dialog"], [role="alertdialog"]') ?? document.body).append(area);
  area.select();
  const isCopied = document.execCommand('copy');
  area.remove();
  if (focused instanceof HTMLElement) focused.focus();
  return isCopied;
}
