/** `fairlead rehearse --merge FILES...`: joins the parts of a study to exactly the whole. */
import { Lane } from '../course/lane.js';
import { mergeParts } from '../rehearsal/shards.js';
import { studyReport } from '../rehearsal/study.js';
import { rehearsalText } from '../report/rehearsal-text.js';
import { readJsonFile } from '../sheet/load.js';
import type { Io } from './io.js';

export async function mergeCommand(files: readonly string[], wantsJson: boolean, io: Io): Promise<void> {
  const read = await Promise.all(
    files.map(async (file) => ({ file, data: (await readJsonFile(file)).data })),
  );
  const { study, results } = mergeParts(read);
  const report = studyReport(study, results);
  if (wantsJson) {
    io.json(report);
    return;
  }
  const names = { vehicle: study.vehicle, course: study.courseName, laps: study.laps };
  io.stdout(rehearsalText(report, new Lane(study.course), names));
  for (const note of report.notes) io.stdout(`Note: ${note}\n`);
}
