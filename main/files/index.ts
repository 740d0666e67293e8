/** Doors of the file room: whole or not at all, never over somebody else's change, nothing lost. */
export { createDocuments, type Documents } from './documents';
export { createJournal, type Journal, type JournalRecord } from './journal';
export { readText } from './read';
export { createRecentFiles, type RecentEntry, type RecentFiles } from './recent';
export { saveText } from './save';
export { wordFileError } from './words';
