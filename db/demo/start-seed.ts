import { seedDemoWorld } from './seed';
import { database } from '../client';

await seedDemoWorld(Date.now(), (line) => console.log(`  ${line}`));
database().close();
