import { nameDatabases, removeDatabases } from './test-database.ts';

/** Runs once before all tests that use a database; what it returns runs after them. */
export default function setUp(): () => Promise<void> {
  nameDatabases();
  return removeDatabases;
}
