import { Command } from 'commander';
import { addCheck } from './commands/check.ts';
import { addCodes } from './commands/codes.ts';
import { addDesk } from './commands/desk.ts';
import { addExplain } from './commands/explain.ts';
import { addMend } from './commands/mend.ts';
import { addReport } from './commands/report.ts';
import { addSize } from './commands/size.ts';
import { addSurvey } from './commands/survey.ts';
import { addView } from './commands/view.ts';
import { addWeigh } from './commands/weigh.ts';
import { programVersion } from './program-version.ts';

/** The whole command line. Verbs load what they need when they run, so that `--help` is quick. */
export function program(): Command {
  const command = new Command('drainwright')
    .description('Sizes the drains and vents of an IFC model by the plumbing code, and says why.')
    .version(programVersion(), '--version', 'print the version')
    .helpOption('--help', 'show help')
    .helpCommand(false)
    .showHelpAfterError('(--help shows what can be asked)')
    .exitOverride()
    .configureHelp({ sortSubcommands: false, helpWidth: 100 });
  for (const add of [
    addCheck,
    addSize,
    addView,
    addDesk,
    addSurvey,
    addExplain,
    addWeigh,
    addMend,
    addReport,
    addCodes,
  ])
    add(command);
  command.addHelpText('after', exitHelp);
  return command;
}

const exitHelp = `
Exit codes: 0 done; 1 done, with errors in the model (check); 2 wrong usage; 3 a file that cannot be used; 70 our own fault.
An undersized drain or vent lets sewer gas into a building: local code, the authority having jurisdiction and a
licensed person decide.`;
