import { setPriority } from 'node:os';
import { runChunk } from '#tests/studies/coverage/chunk.ts';
import type { Task } from '#tests/studies/coverage/schedule.ts';

// A study takes an hour or more: it gives way to whatever else the machine is asked for.
setPriority(15);
process.on('message', (task: Task) => process.send!(runChunk(task.cell, task.chunk)));
process.on('disconnect', () => process.exit(0));
