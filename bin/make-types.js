#!/usr/bin/env node
// Writes the TypeScript types of the sheet and the course from their JSON schemas.
// With --check only compares and exits 4 when a file is stale.
import { readFile, writeFile } from 'node:fs/promises';
import { compile } from 'json-schema-to-typescript';
import prettier from 'prettier';

const root = new URL('..', import.meta.url);
const jobs = [
  { schema: 'schemas/sheet.schema.json', types: 'src/sheet/sheet-types.ts', name: 'Sheet' },
  { schema: 'schemas/course.schema.json', types: 'src/course/course-types.ts', name: 'Course' },
];

/** Removes titles (they would become an alias per field) and appends each field's unit to its comment. */
function plain(node, keepTitle = false) {
  if (Array.isArray(node)) return node.map((item) => plain(item));
  if (node === null || typeof node !== 'object') return node;
  const out = {};
  for (const [key, value] of Object.entries(node)) {
    if (key === 'title' && typeof value === 'string' && !keepTitle) continue;
    if (key === 'description' && typeof value === 'string' && node.unit) out[key] = `${value} [${node.unit}]`;
    else out[key] = plain(value);
  }
  return out;
}

let stale = false;
for (const { schema, types, name } of jobs) {
  const source = JSON.parse(await readFile(new URL(schema, root), 'utf8'));
  const code = await compile({ ...plain(source), title: name }, name, {
    bannerComment: `// Made from ${schema} by \`npm run types\`; do not edit.`,
    additionalProperties: false,
    ignoreMinAndMaxItems: true,
  });
  const options = await prettier.resolveConfig(new URL(types, root));
  const text = await prettier.format(code, { ...options, parser: 'typescript' });
  const target = new URL(types, root);
  if (process.argv.includes('--check')) {
    const found = await readFile(target, 'utf8').catch(() => '');
    if (found !== text) {
      stale = true;
      console.error(`${types} is stale. Run \`npm run types\`.`);
    }
  } else {
    await writeFile(target, text);
  }
}
process.exitCode = stale ? 4 : 0;
