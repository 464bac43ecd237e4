import { readFileSync, writeFileSync } from 'node:fs';
import { chromium } from 'playwright-core';
import { AxeBuilder } from '@axe-core/playwright';
import nodemailer from 'nodemailer';
import { startSmtp } from '#fakes/smtp/start-smtp.ts';
import { thanksLetter, dedicationLetter } from '#server/giving/giving-emails.ts';
const s = JSON.parse(readFileSync('emails/giving/gift-thanks.sample.json','utf8'));
s.receipt.declaration.wording="Treat as Gift Aid donations this gift, any gift I made to the Brackenhythe Heritage Society in the past four years, and on any I make from now on. I pay UK Income Tax or Capital Gains Tax. I understand that if I pay less of those taxes in a tax year than all charities together claim as Gift Aid on my gifts in that year, I must pay the difference myself.";
const d = JSON.parse(readFileSync('emails/giving/dedication-told.sample.json','utf8'));
const smtp = await startSmtp({ port: 0, pagePort: 0 });
const t = nodemailer.createTransport(smtp.smtpUrl);
const from = { name: 'Brackenhythe Heritage Society', address: 'post@brackenhythe.example' };
const dl = await dedicationLetter(d);
await t.sendMail({ from, to: { name: 'Ann Tolliver', address: 'ann.tolliver@post.example' }, subject: dl.subject, html: dl.html, text: dl.plain });
const time = Date.now();
for (let i=0;i<12;i++){ const l = await thanksLetter({ ...s.receipt, dedication: i % 3 ? null : s.receipt.dedication }, s.addresses);
await t.sendMail({ from, to: { name: 'Thea Quillan', address: `thea.quillan${i}@post.example` }, subject: l.subject, html: l.html, text: l.plain });}
console.log('ms per mail', (Date.now()-time)/12);
const browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: ['--no-sandbox','--disable-gpu'] });
for (const [scheme, width] of [['light',1280],['dark',1280],['light',320],['dark',390]] as const) {
  const ctx = await browser.newContext({ colorScheme: scheme, viewport: { width, height: 900 } });
  const page = await ctx.newPage();
  page.on('console', (m) => console.log('console', m.text()));
  for (const [name, path] of [['list','/'],['letter','/letters/11'],['ded','/letters/1'],['none','/?words=zzz']] as const) {
    await page.goto(smtp.pageUrl + path); await page.waitForLoadState('networkidle');
    if (name!=='none') await page.screenshot({ path: `/tmp/shot-${name}-${scheme}-${width}.png`, fullPage: name==='letter' });
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth > innerWidth);
    try { const r = await new AxeBuilder({ page }).analyze();
    console.log(name, scheme, width, 'overflow', overflow, r.violations.map(v => v.id + ':' + v.nodes.map(n=>n.target.join(' ')+' '+n.any.map(a=>a.message).join(';')).slice(0,3).join('|'))); } catch (e) { console.log('axe', name, String(e).slice(0,200)); }
  }
  for (const [n,h] of [['thanks', (await thanksLetter(s.receipt, s.addresses)).html],['dedl', dl.html]] as const) {
    await page.setContent(h); await page.screenshot({ path: `/tmp/mail-${n}-${scheme}-${width}.png`, fullPage: true });
    const r = await new AxeBuilder({ page }).analyze(); console.log('mail', n, scheme, width, r.violations.map(v => v.id+':'+v.nodes.slice(0,2).map(x=>x.html.slice(0,80)+' '+x.any.map(a=>a.message).join(';')).join('|')));
  }
  await ctx.close();
}
await browser.close(); await smtp.stop();
