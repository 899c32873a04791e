/** What is saved, and as what. */
export interface FileToSave {
  readonly suggestedName: string;
  readonly type: string;
  /** made after the place is chosen, since a browser opens its dialog only straight after a press */
  readonly content: () => string | Blob | Promise<string | Blob>;
}

interface WritableFile {
  createWritable(): Promise<{ write(content: string | Blob): Promise<void>; close(): Promise<void> }>;
}

type SavePicker = (options: { readonly suggestedName: string }) => Promise<WritableFile>;

/** Saves where the user says, or, in browsers without that dialog, among the downloads. */
export async function saveFile(file: FileToSave): Promise<void> {
  const { showSaveFilePicker } = window as { showSaveFilePicker?: SavePicker };
  if (showSaveFilePicker === undefined) return download(file);
  let writable: Awaited<ReturnType<WritableFile['createWritable']>>;
  try {
    const handle = await showSaveFilePicker.call(window, { suggestedName: file.suggestedName });
    writable = await handle.createWritable();
  } catch (error) {
    // closed by the user: nothing to do; forbidden by the host: the other way
    if (error instanceof DOMException && error.name === 'AbortError') return;
    return download(file);
  }
  await writable.write(await file.content());
  await writable.close();
}

/** Long enough for the browser to have begun the download. */
const REVOKE_AFTER_MS = 60_000;

async function download({ suggestedName, type, content }: FileToSave): Promise<void> {
  const address = URL.createObjectURL(new Blob([await content()], { type }));
  const link = document.createElement('a');
  link.href = address;
  link.download = suggestedName;
  link.click();
  setTimeout(() => URL.revokeObjectURL(address), REVOKE_AFTER_MS);
}
