import { dataFolder } from './folders.mjs'
import { PATIENCE, startKept } from './kept-cluster.mjs'
import { startThrowaway } from './throwaway-cluster.mjs'

/**
 * @typedef {object} Running
 * @property {string} url
 * @property {() => Promise<void>} stop ends it; a throwaway one is removed too
 * @property {() => Promise<void>} crash ends it at once, as a power cut would
 * @property {() => Promise<void>} restart starts it again on the same port
 */

/**
 * Starts a private PostgreSQL: the one kept in a data folder, or a throwaway one that ends with this process.
 * @param {{dir?: string, ephemeral?: boolean, durable?: boolean, patience?: number}} [options] durable: a throwaway one that really writes to disk
 * @returns {Promise<Running>}
 */
export function startCluster({ dir = dataFolder(), ephemeral = false, durable = false, patience = PATIENCE } = {}) {
  return ephemeral ? startThrowaway(durable) : startKept(dir, patience)
}
