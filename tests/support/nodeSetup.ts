// Passwords are hashed at cost 12 in the product; tests would spend most of their time there.
process.env.NODE_ENV = 'test';
process.env.EBBLINE_BCRYPT_COST = '4';
