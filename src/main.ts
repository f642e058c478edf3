#!/usr/bin/env node
import { runCommand } from './commands/command-line.js';

process.exitCode = await runCommand(process.argv.slice(2));
