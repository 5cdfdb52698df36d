/** How a reading gets at the text of a table beside the design; the file system stays behind it. */
export type TableFileReader = (name: string) => TableFile;

export type TableFile =
  | { readonly ok: true; readonly text: string /** As shown in faults. */; readonly file: string }
  | { readonly ok: false; readonly problem: string; readonly expected?: string; readonly suggestion?: string };
