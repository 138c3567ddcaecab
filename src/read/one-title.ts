import { knownHeading } from './headings.ts';
import { plainWords, type ToldBlock } from './told.ts';

/** Only the first title names the article, unless it names one of its parts, as "Results" does. */
export function withOneTitle(blocks: readonly ToldBlock[]): readonly ToldBlock[] {
  const title = blocks.find(({ kind }) => kind === 'title');
  return blocks.map((block) => {
    if (block.kind !== 'title') return block;
    const isTitle = block === title && knownHeading(plainWords(block.words)) === undefined;
    return isTitle ? block : { ...block, kind: 'heading' };
  });
}
