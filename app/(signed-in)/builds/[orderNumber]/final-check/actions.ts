'use server';

import { revalidatePath } from 'next/cache';
import { askConcession, deliverBuild, passFinalCheck, shipBuild } from '@/db/queries/final-check';
import { linkProof, unlinkProof } from '@/db/queries/proofs';
import { action } from '@/lib/action';
import { wakeMail } from '@/lib/jobs/run';
import { concessionForm, finishedBuild, proofLink, shipment } from '@/lib/validation/checks';

const renew = (orderNumber: string) => revalidatePath(`/builds/${orderNumber}`, 'layout');

export const pass = action(finishedBuild, async (viewer, { orderNumber }) => {
  await passFinalCheck(viewer, orderNumber, Date.now());
  wakeMail();
  renew(orderNumber);
});

export const ship = action(shipment, async (viewer, shipped) => {
  await shipBuild(viewer, shipped, Date.now());
  wakeMail();
  renew(shipped.orderNumber);
  return 'Written down.';
});

export const deliver = action(finishedBuild, async (viewer, { orderNumber }) => {
  await deliverBuild(viewer, orderNumber, Date.now());
  renew(orderNumber);
});

export const concede = action(concessionForm, async (viewer, wish) => {
  await askConcession(viewer, wish, Date.now());
  wakeMail();
  renew(wish.orderNumber);
  return 'Asked. The owner reads both values and your reason, and signs or asks for a change.';
});

export const link = action(proofLink, async (viewer, proof) => {
  await linkProof(viewer, proof, Date.now());
  renew(proof.orderNumber);
  return 'Linked.';
});

export const unlink = action(proofLink, async (viewer, proof) => {
  await unlinkProof(viewer, proof);
  renew(proof.orderNumber);
});
