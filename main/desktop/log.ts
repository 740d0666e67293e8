/** The shell's log, in the system's folder for logs. It tells what happened to processes and files, never what is in a file. */
import log from 'electron-log/main';

log.transports.console.level = 'warn';
log.transports.file.maxSize = 2 ** 20;

export { log };
