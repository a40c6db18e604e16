/** The terminal as the questionnaire uses it. Ctrl-C and the end of the input count as leaving; nothing is thrown for them. */
import { choicePrompt } from './choice-prompt.js';
import type { PromptConfig, Reply } from './prompt-frame.js';
import type { Question } from './question.js';
import { textPrompt } from './text-prompt.js';

/** What the questionnaire needs of a terminal. */
export interface Surface {
  /** Puts a question and waits for the reply. */
  ask(question: Question, canGoBack: boolean): Promise<Reply>;
  /** Writes lines between the questions. */
  say(text: string): void;
  /** Width in characters, as it is now. */
  readonly columns: number;
  style: PromptConfig['style'];
}

/** Some terminals do not say how wide they are. */
const USUAL_COLUMNS = 80;

const columnsOf = ({ columns }: NodeJS.WriteStream): number => (columns > 0 ? columns : USUAL_COLUMNS);

/** The surface on a terminal's output stream; `say` writes to the same. */
export function terminalSurface(
  output: NodeJS.WriteStream,
  say: (text: string) => void,
  style: PromptConfig['style'],
): Surface {
  return {
    say,
    style,
    get columns() {
      return columnsOf(output);
    },
    async ask(question, canGoBack) {
      const config = { question, canGoBack, columns: columnsOf(output), style };
      const prompt = question.choices ? choicePrompt : textPrompt;
      try {
        return await prompt(config, { output });
      } catch (error) {
        // So inquirer reports Ctrl-C.
        if (error instanceof Error && error.name === 'ExitPromptError') return { kind: 'closed' };
        throw error;
      }
    },
  };
}
