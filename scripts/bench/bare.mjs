// A bare Express server with one route, to measure the machine by: node bare.mjs PORT
import express from 'express';

const app = express();
app.get('/', (_req, res) => res.json({ ok: true }));
app.listen(Number(process.argv[2]), '127.0.0.1');
