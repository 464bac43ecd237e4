// The stylesheet and the one small script, served as files since pages carry nothing inline.
import { fileURLToPath } from 'node:url';
import express from 'express';

const FILES = ['stand-in.css', 'card-page.js'];

export function pageAssets() {
  const router = express.Router();
  for (const name of FILES)
    router.get(`/${name}`, (_req, res) => {
      res.set('cache-control', 'no-cache').sendFile(fileURLToPath(new URL(name, import.meta.url)));
    });
  return router;
}
