process.stdout.write('levelwright\n');
