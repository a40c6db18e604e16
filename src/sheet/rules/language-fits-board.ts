import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'language-fits-board',
  level: 'problem',
  why: 'Each board is served in one language.',
  check({ sheet, board }) {
    const { language } = sheet.target;
    if (language === board.language) return [];
    return [
      {
        pointer: '/target/language',
        message: `${board.title} does not take ${language}.`,
        got: language,
        allowed: board.language,
        fix: `Write "${board.language}", or choose another board.`,
      },
    ];
  },
};
