import { v7 as uuidV7 } from 'uuid';
import { connect } from '#db/connection.ts';
import { Cipher } from '#db/models/cipher.ts';
import { Rework } from '#db/models/rework.ts';
import { createCipherCache } from '#server/services/cipher-cache.ts';
import { runRework } from '#server/services/reworks/run-rework.ts';
const knex = connect(process.env.DATABASE_URL!, { statementTimeout: 0 });
const c = await Cipher.query(knex).findOne({ slug: 'brackwater-ten-letter' }).throwIfNotFound();
for (const n of [1]) {
const { id } = await Rework.query(knex).insert({ id: uuidV7(), factId: c.id, kind: 'cipher', version: 1, makers: [c.makerId], models: [] });
console.time('rework'); await runRework(id, { knex, ciphers: createCipherCache({ onUnusable: () => undefined }), signal: new AbortController().signal }); console.timeEnd('rework');
}
await knex.destroy();
