/** Where the page finds the engine when its file is loaded as a plain script, because no worker starts. */
export const entryOnMainThread = 'overbrimEngine';
