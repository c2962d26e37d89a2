#!/usr/bin/env node
/** `pnpm cases DIR`: runs a folder of reference cases and prints their quantities as one JSON object. */
import { main } from './dist/main.js';

process.exitCode = await main(process.argv.slice(2));
