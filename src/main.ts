#!/usr/bin/env node
import { runProgram } from './cli/run-program.js';

await runProgram(process.argv.slice(2));
