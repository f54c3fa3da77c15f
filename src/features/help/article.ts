import type { HelpAnchor } from '../../help-anchors';

/** One answer of Help: what a figure means, how it is computed, and where the method is published. */
export type HelpArticle = {
  anchor: HelpAnchor;
  title: string;
  /** Paragraphs, first the plain answer. */
  body: readonly string[];
  /** How it is computed, in one line that can be checked by hand. */
  formula?: string;
  sources?: readonly string[];
};
