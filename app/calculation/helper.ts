import { workerData } from 'node:worker_threads';
import { helpThread } from '#engine';
import type { HelperStart } from './helpers';
import { giveWay } from './priority';

giveWay();
const { memory, control, helper } = workerData as HelperStart;
helpThread(memory, control, helper);
