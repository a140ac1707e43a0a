//! strickle
