/** The spelling that matching uses: trimmed, spaces and case folded. */
export const foldText = (text: string): string => text.trim().replace(/\s+/g, ' ').toLowerCase();
