import process from 'node:process';
import { runCommandLine } from './main';

process.exitCode = await runCommandLine(process.argv.slice(2));
