/** The browser's side of the 3D view, bundled to one script by bundle-view.mjs when the project is built. */
export const VIEW_BUNDLE: string;
