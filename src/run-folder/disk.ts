import { mkdir, readdir, realpath, rename, rm, rmdir, writeFile } from 'node:fs/promises';

/** The calls to the file system that writing a run folder makes; tests hand in one that fails. */
export const disk = { mkdir, readdir, realpath, rename, rm, rmdir, writeFile };
export type Disk = typeof disk;
