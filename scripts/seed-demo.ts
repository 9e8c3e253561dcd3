import { seedDemo } from '@/db/seeds/demo';

/** Makes the demo data once; says so when it did. */
const ownerUrl = process.env.DATABASE_OWNER_URL;
if (!ownerUrl) throw new Error('DATABASE_OWNER_URL is not set; "npm start" sets it.');
if (await seedDemo(ownerUrl)) console.log('Demo data made.');
