/*
 * Floodmark: barrier options, touches and the law of Brownian motion with its extremes.
 *
 * Generated from the sources and never edited by hand. To make it anew:
 *     FLOODMARK_BLESS=1 cargo test -p floodmark-tests --test header
 *
 * Every function but floodmark_version returns a FLOODMARK_STATUS: 0, or the number of the rule that was broken.
 * Outputs are written only on success. A call over columns succeeds even if rows are refused: it writes every row,
 * NaN and the row's status where it is refused, and no row disturbs another.
 * Nothing is allocated for the caller and nothing is kept between calls; every function may be called from any
 * thread. No exception, unwinding or abort leaves the library. Scalar and column calls give the same bits.
 *
 * Units: spot, strike, barrier and rebate in one currency; expiry in years; vol per square root of a year; rate and
 * dividend per year, continuously compounded (dividend is the foreign rate for a currency pair).
 *
 * Model values, not advice. Validate independently before use. Local rules and licensed practice decide.
 */

#ifndef FLOODMARK_H
#define FLOODMARK_H

#include <stddef.h>
#include <stdint.h>

/* The version of this header; floodmark_version() is that of the library. */
#define FLOODMARK_VERSION "0.1.0"
#define FLOODMARK_VERSION_MAJOR 0
#define FLOODMARK_VERSION_MINOR 1
#define FLOODMARK_VERSION_PATCH 0

/**
 * The outcome of a call or of a row. Numbers are never reused; from 100 on they speak of a whole call.
 */
enum FloodmarkStatus {
    /** ok */
    FLOODMARK_STATUS_OK = 0,
    /** contract is not one that is known */
    FLOODMARK_STATUS_CONTRACT = 1,
    /** rebate_paid must be hit or expiry */
    FLOODMARK_STATUS_REBATE_PAID = 2,
    /** rebate_paid is hit, but this contract has no hit to pay at */
    FLOODMARK_STATUS_REBATE_AT_HIT = 3,
    /** spot must be positive and finite */
    FLOODMARK_STATUS_SPOT = 10,
    /** strike must be positive and finite */
    FLOODMARK_STATUS_STRIKE = 11,
    /** barrier must be positive and finite */
    FLOODMARK_STATUS_BARRIER = 12,
    /** rebate must be finite and at least 0 */
    FLOODMARK_STATUS_REBATE = 13,
    /** expiry must be from 0 to 10000 years */
    FLOODMARK_STATUS_EXPIRY = 14,
    /** vol must be from 0 to 1000 */
    FLOODMARK_STATUS_VOL = 15,
    /** rate must be from -1000 to 1000 */
    FLOODMARK_STATUS_RATE = 16,
    /** dividend must be from -1000 to 1000 */
    FLOODMARK_STATUS_DIVIDEND = 17,
    /** the answer is beyond the range of a binary64 number */
    FLOODMARK_STATUS_OVERFLOW = 20,
    /** quantity is not one that is known */
    FLOODMARK_STATUS_QUANTITY = 30,
    /** drift must be from -1e75 to 1e75 */
    FLOODMARK_STATUS_DRIFT = 31,
    /** horizon must be from 1e-75 to 1e75 */
    FLOODMARK_STATUS_HORIZON = 32,
    /** level must be from -1e75 to 1e75, and not 0 for a density of its time */
    FLOODMARK_STATUS_LEVEL = 33,
    /** terminal must be from -1e75 to 1e75 */
    FLOODMARK_STATUS_TERMINAL = 34,
    /** time must be at least 0 */
    FLOODMARK_STATUS_TIME = 35,
    /** probability must be from 0 to 1 */
    FLOODMARK_STATUS_PROBABILITY = 36,
    /** discount_rate must be from -1e75 to 1e75 */
    FLOODMARK_STATUS_DISCOUNT_RATE = 37,
    /** uniform must be strictly between 0 and 1 */
    FLOODMARK_STATUS_UNIFORM = 38,
    /** vol must be from 1e-75 to 1e75 */
    FLOODMARK_STATUS_LAW_VOL = 39,
    /** other_drift must be from -1e75 to 1e75 */
    FLOODMARK_STATUS_OTHER_DRIFT = 40,
    /** a required pointer is null */
    FLOODMARK_STATUS_NULL_POINTER = 100,
    /** a column is shorter than the call needs */
    FLOODMARK_STATUS_COLUMN_LENGTH = 101,
    /** a fault inside the library was caught at its border */
    FLOODMARK_STATUS_INTERNAL = 102,
};

/**
 * What is paid, and what touching the barrier does. Calls take these as uint8_t.
 */
enum FloodmarkContract {
    /** call */
    FLOODMARK_CONTRACT_CALL = 0,
    /** put */
    FLOODMARK_CONTRACT_PUT = 1,
    /** cash call */
    FLOODMARK_CONTRACT_CASH_CALL = 2,
    /** cash put */
    FLOODMARK_CONTRACT_CASH_PUT = 3,
    /** asset call */
    FLOODMARK_CONTRACT_ASSET_CALL = 4,
    /** asset put */
    FLOODMARK_CONTRACT_ASSET_PUT = 5,
    /** cash */
    FLOODMARK_CONTRACT_CASH = 6,
    /** asset */
    FLOODMARK_CONTRACT_ASSET = 7,
    /** up-and-out call */
    FLOODMARK_CONTRACT_UP_AND_OUT_CALL = 8,
    /** up-and-out put */
    FLOODMARK_CONTRACT_UP_AND_OUT_PUT = 9,
    /** up-and-out cash call */
    FLOODMARK_CONTRACT_UP_AND_OUT_CASH_CALL = 10,
    /** up-and-out cash put */
    FLOODMARK_CONTRACT_UP_AND_OUT_CASH_PUT = 11,
    /** up-and-out asset call */
    FLOODMARK_CONTRACT_UP_AND_OUT_ASSET_CALL = 12,
    /** up-and-out asset put */
    FLOODMARK_CONTRACT_UP_AND_OUT_ASSET_PUT = 13,
    /** up-and-out cash */
    FLOODMARK_CONTRACT_UP_AND_OUT_CASH = 14,
    /** up-and-out asset */
    FLOODMARK_CONTRACT_UP_AND_OUT_ASSET = 15,
    /** up-and-in call */
    FLOODMARK_CONTRACT_UP_AND_IN_CALL = 16,
    /** up-and-in put */
    FLOODMARK_CONTRACT_UP_AND_IN_PUT = 17,
    /** up-and-in cash call */
    FLOODMARK_CONTRACT_UP_AND_IN_CASH_CALL = 18,
    /** up-and-in cash put */
    FLOODMARK_CONTRACT_UP_AND_IN_CASH_PUT = 19,
    /** up-and-in asset call */
    FLOODMARK_CONTRACT_UP_AND_IN_ASSET_CALL = 20,
    /** up-and-in asset put */
    FLOODMARK_CONTRACT_UP_AND_IN_ASSET_PUT = 21,
    /** up-and-in cash */
    FLOODMARK_CONTRACT_UP_AND_IN_CASH = 22,
    /** up-and-in asset */
    FLOODMARK_CONTRACT_UP_AND_IN_ASSET = 23,
    /** down-and-out call */
    FLOODMARK_CONTRACT_DOWN_AND_OUT_CALL = 24,
    /** down-and-out put */
    FLOODMARK_CONTRACT_DOWN_AND_OUT_PUT = 25,
    /** down-and-out cash call */
    FLOODMARK_CONTRACT_DOWN_AND_OUT_CASH_CALL = 26,
    /** down-and-out cash put */
    FLOODMARK_CONTRACT_DOWN_AND_OUT_CASH_PUT = 27,
    /** down-and-out asset call */
    FLOODMARK_CONTRACT_DOWN_AND_OUT_ASSET_CALL = 28,
    /** down-and-out asset put */
    FLOODMARK_CONTRACT_DOWN_AND_OUT_ASSET_PUT = 29,
    /** down-and-out cash */
    FLOODMARK_CONTRACT_DOWN_AND_OUT_CASH = 30,
    /** down-and-out asset */
    FLOODMARK_CONTRACT_DOWN_AND_OUT_ASSET = 31,
    /** down-and-in call */
    FLOODMARK_CONTRACT_DOWN_AND_IN_CALL = 32,
    /** down-and-in put */
    FLOODMARK_CONTRACT_DOWN_AND_IN_PUT = 33,
    /** down-and-in cash call */
    FLOODMARK_CONTRACT_DOWN_AND_IN_CASH_CALL = 34,
    /** down-and-in cash put */
    FLOODMARK_CONTRACT_DOWN_AND_IN_CASH_PUT = 35,
    /** down-and-in asset call */
    FLOODMARK_CONTRACT_DOWN_AND_IN_ASSET_CALL = 36,
    /** down-and-in asset put */
    FLOODMARK_CONTRACT_DOWN_AND_IN_ASSET_PUT = 37,
    /** down-and-in cash */
    FLOODMARK_CONTRACT_DOWN_AND_IN_CASH = 38,
    /** down-and-in asset */
    FLOODMARK_CONTRACT_DOWN_AND_IN_ASSET = 39,
    /** up one-touch */
    FLOODMARK_CONTRACT_UP_ONE_TOUCH = 40,
    /** down one-touch */
    FLOODMARK_CONTRACT_DOWN_ONE_TOUCH = 41,
    /** up no-touch */
    FLOODMARK_CONTRACT_UP_NO_TOUCH = 42,
    /** down no-touch */
    FLOODMARK_CONTRACT_DOWN_NO_TOUCH = 43,
};

/**
 * When a rebate, or the amount of a touch, is paid. Calls take these as uint8_t.
 */
enum FloodmarkRebatePaid {
    /** hit for knock-outs and one-touches, expiry for the rest */
    FLOODMARK_REBATE_PAID_NATURAL = 0,
    /** when the barrier is touched */
    FLOODMARK_REBATE_PAID_HIT = 1,
    /** at expiry */
    FLOODMARK_REBATE_PAID_EXPIRY = 2,
};

/**
 * What floodmark_law_columns can be asked, each with the function that answers the same for one law.
 */
enum FloodmarkQuantity {
    /** floodmark_terminal_pdf(drift, vol, horizon, terminal, value) */
    FLOODMARK_QUANTITY_TERMINAL_PDF = 0,
    /** floodmark_terminal_cdf(drift, vol, horizon, terminal, value) */
    FLOODMARK_QUANTITY_TERMINAL_CDF = 1,
    /** floodmark_terminal_quantile(drift, vol, horizon, probability, value) */
    FLOODMARK_QUANTITY_TERMINAL_QUANTILE = 2,
    /** floodmark_max_pdf(drift, vol, horizon, level, value) */
    FLOODMARK_QUANTITY_MAX_PDF = 3,
    /** floodmark_max_cdf(drift, vol, horizon, level, value) */
    FLOODMARK_QUANTITY_MAX_CDF = 4,
    /** floodmark_max_tail(drift, vol, horizon, level, value) */
    FLOODMARK_QUANTITY_MAX_TAIL = 5,
    /** floodmark_max_quantile(drift, vol, horizon, probability, value) */
    FLOODMARK_QUANTITY_MAX_QUANTILE = 6,
    /** floodmark_min_pdf(drift, vol, horizon, level, value) */
    FLOODMARK_QUANTITY_MIN_PDF = 7,
    /** floodmark_min_cdf(drift, vol, horizon, level, value) */
    FLOODMARK_QUANTITY_MIN_CDF = 8,
    /** floodmark_min_tail(drift, vol, horizon, level, value) */
    FLOODMARK_QUANTITY_MIN_TAIL = 9,
    /** floodmark_min_quantile(drift, vol, horizon, probability, value) */
    FLOODMARK_QUANTITY_MIN_QUANTILE = 10,
    /** floodmark_joint_max_cdf(drift, vol, horizon, terminal, level, value) */
    FLOODMARK_QUANTITY_JOINT_MAX_CDF = 11,
    /** floodmark_joint_max_pdf(drift, vol, horizon, terminal, level, value) */
    FLOODMARK_QUANTITY_JOINT_MAX_PDF = 12,
    /** floodmark_joint_min_cdf(drift, vol, horizon, terminal, level, value) */
    FLOODMARK_QUANTITY_JOINT_MIN_CDF = 13,
    /** floodmark_joint_min_pdf(drift, vol, horizon, terminal, level, value) */
    FLOODMARK_QUANTITY_JOINT_MIN_PDF = 14,
    /** floodmark_survival(drift, vol, horizon, level, value) */
    FLOODMARK_QUANTITY_SURVIVAL = 15,
    /** floodmark_first_passage_pdf(drift, vol, horizon, level, time, value) */
    FLOODMARK_QUANTITY_FIRST_PASSAGE_PDF = 16,
    /** floodmark_first_passage_cdf(drift, vol, horizon, level, time, value) */
    FLOODMARK_QUANTITY_FIRST_PASSAGE_CDF = 17,
    /** floodmark_first_passage_quantile(drift, vol, horizon, level, probability, value) */
    FLOODMARK_QUANTITY_FIRST_PASSAGE_QUANTILE = 18,
    /** floodmark_discounted_first_passage(drift, vol, horizon, level, discount_rate, value) */
    FLOODMARK_QUANTITY_DISCOUNTED_FIRST_PASSAGE = 19,
    /** floodmark_bridge_crossing(drift, vol, horizon, terminal, level, value) */
    FLOODMARK_QUANTITY_BRIDGE_CROSSING = 20,
    /** floodmark_sample_terminal(drift, vol, horizon, uniform, value) */
    FLOODMARK_QUANTITY_SAMPLE_TERMINAL = 21,
    /** floodmark_sample_max(drift, vol, horizon, terminal, uniform, value) */
    FLOODMARK_QUANTITY_SAMPLE_MAX = 22,
    /** floodmark_sample_min(drift, vol, horizon, terminal, uniform, value) */
    FLOODMARK_QUANTITY_SAMPLE_MIN = 23,
    /** floodmark_drift_weight(drift, vol, horizon, terminal, other_drift, value) */
    FLOODMARK_QUANTITY_DRIFT_WEIGHT = 24,
};


/**
 * The value of a contract and its analytic sensitivities.
 *
 * Units: in the currency of the spot; per 1.00 of spot, vol, rate and dividend, per year of time. theta and charm
 * run with the calendar: they are minus the derivative in expiry.
 */
typedef struct FloodmarkGreeks {
    /**
     * The value V, bit for bit what floodmark_price gives.
     */
    double value;
    /**
     * dV / d spot
     */
    double delta;
    /**
     * d2V / d spot2
     */
    double gamma;
    /**
     * dV / d vol
     */
    double vega;
    /**
     * -dV / d expiry
     */
    double theta;
    /**
     * dV / d rate
     */
    double rho;
    /**
     * dV / d dividend
     */
    double dividend_rho;
    /**
     * d2V / d spot d vol
     */
    double vanna;
    /**
     * d2V / d vol2
     */
    double volga;
    /**
     * -d2V / d spot d expiry
     */
    double charm;
    /**
     * dV / d barrier
     */
    double barrier_delta;
    /**
     * dV / d strike
     */
    double strike_delta;
} FloodmarkGreeks;

/**
 * Where a contract stands against its barrier.
 */
typedef struct FloodmarkBarrierProfile {
    /**
     * Probability, in the cash measure, that the barrier is touched by expiry: 1 if it is touched now, 0 for a
     * contract without a barrier.
     */
    double touch_probability;
    /**
     * |ln(barrier / spot)| / (vol sqrt(expiry)), in standard deviations: 0 if touched now, infinite without a
     * barrier or without volatility.
     */
    double distance;
    /**
     * The jump of value at the barrier at expiry, touched minus untouched: what a desk calls the gap. 0 for a
     * contract without a barrier.
     */
    double gap;
} FloodmarkBarrierProfile;

/**
 * A column of input codes: row i is first[i * stride]. A stride of 0 puts one code in every row.
 */
typedef struct FloodmarkCodes {
    /**
     * The code of row 0; null only if there are no rows.
     */
    const uint8_t *first;
    /**
     * From one row to the next, in elements (here also bytes).
     */
    ptrdiff_t stride;
} FloodmarkCodes;

/**
 * A column of input numbers: row i is first[i * stride]. A stride of 0 puts one number in every row, a negative
 * one reads backwards.
 */
typedef struct FloodmarkNumbers {
    /**
     * The number of row 0; null only if there are no rows.
     */
    const double *first;
    /**
     * From one row to the next, in elements (not bytes).
     */
    ptrdiff_t stride;
} FloodmarkNumbers;

/**
 * The inputs of a book of contracts, one a row, each as in floodmark_price. Every column must be given; a number
 * that is the same in all rows is a column with stride 0.
 */
typedef struct FloodmarkBook {
    /**
     * How many rows the book has.
     */
    size_t rows;
    /**
     * FLOODMARK_CONTRACT codes.
     */
    struct FloodmarkCodes contract;
    /**
     * Spots.
     */
    struct FloodmarkNumbers spot;
    /**
     * Strikes; ignored, NaN included, in rows without a strike.
     */
    struct FloodmarkNumbers strike;
    /**
     * Barriers; ignored, NaN included, in rows without a barrier.
     */
    struct FloodmarkNumbers barrier;
    /**
     * Rebates, or the amounts of touches; ignored, NaN included, in rows without a barrier.
     */
    struct FloodmarkNumbers rebate;
    /**
     * FLOODMARK_REBATE_PAID codes.
     */
    struct FloodmarkCodes rebate_paid;
    /**
     * Years to expiry.
     */
    struct FloodmarkNumbers expiry;
    /**
     * Volatilities.
     */
    struct FloodmarkNumbers vol;
    /**
     * Interest rates.
     */
    struct FloodmarkNumbers rate;
    /**
     * Dividend yields.
     */
    struct FloodmarkNumbers dividend;
} FloodmarkBook;

/**
 * A column of results: row i goes to first[i * stride].
 */
typedef struct FloodmarkResults {
    /**
     * Where the result of row 0 goes. Among Greeks and barrier profiles null means that the column is not wanted.
     */
    double *first;
    /**
     * From one row to the next, in elements (not bytes).
     */
    ptrdiff_t stride;
} FloodmarkResults;

/**
 * A column of statuses: row i goes to first[i * stride].
 */
typedef struct FloodmarkStatuses {
    /**
     * Where the status of row 0 goes; null only if there are no rows.
     */
    int32_t *first;
    /**
     * From one row to the next, in elements (not bytes).
     */
    ptrdiff_t stride;
} FloodmarkStatuses;

/**
 * Where the Greeks of a book go, each as in FloodmarkGreeks; a column whose first is null is not wanted.
 */
typedef struct FloodmarkGreekColumns {
    /**
     * Values.
     */
    struct FloodmarkResults value;
    /**
     * Deltas.
     */
    struct FloodmarkResults delta;
    /**
     * Gammas.
     */
    struct FloodmarkResults gamma;
    /**
     * Vegas.
     */
    struct FloodmarkResults vega;
    /**
     * Thetas.
     */
    struct FloodmarkResults theta;
    /**
     * Rhos.
     */
    struct FloodmarkResults rho;
    /**
     * Rhos of the dividend yield.
     */
    struct FloodmarkResults dividend_rho;
    /**
     * Vannas.
     */
    struct FloodmarkResults vanna;
    /**
     * Volgas.
     */
    struct FloodmarkResults volga;
    /**
     * Charms.
     */
    struct FloodmarkResults charm;
    /**
     * Barrier deltas.
     */
    struct FloodmarkResults barrier_delta;
    /**
     * Strike deltas.
     */
    struct FloodmarkResults strike_delta;
} FloodmarkGreekColumns;

/**
 * Where the barrier profiles of a book go, each as in FloodmarkBarrierProfile; a column whose first is null is not
 * wanted.
 */
typedef struct FloodmarkProfileColumns {
    /**
     * Probabilities of touching.
     */
    struct FloodmarkResults touch_probability;
    /**
     * Distances in standard deviations.
     */
    struct FloodmarkResults distance;
    /**
     * Gaps.
     */
    struct FloodmarkResults gap;
} FloodmarkProfileColumns;

/**
 * A value with a bound on its error.
 */
typedef struct FloodmarkBoundedPrice {
    /**
     * The value, bit for bit what floodmark_price returns.
     */
    double value;
    /**
     * The value of the exact binary inputs lies within this of value.
     */
    double error_bound;
} FloodmarkBoundedPrice;

/**
 * The inputs of a quantity of the law of W_t = drift t + vol B_t on [0, horizon], one law a row.
 */
typedef struct FloodmarkLawColumns {
    /**
     * How many rows there are.
     */
    size_t rows;
    /**
     * Drifts.
     */
    struct FloodmarkNumbers drift;
    /**
     * Volatilities.
     */
    struct FloodmarkNumbers vol;
    /**
     * Horizons.
     */
    struct FloodmarkNumbers horizon;
    /**
     * What the quantity's own function takes after the horizon.
     */
    struct FloodmarkNumbers first;
    /**
     * What it takes after that; ignored, and may be null, where it takes nothing more.
     */
    struct FloodmarkNumbers second;
} FloodmarkLawColumns;

#ifdef __cplusplus
extern "C" {
#endif // __cplusplus

/**
 * The version of the library that is linked, as MAJOR.MINOR.PATCH; to be compared with FLOODMARK_VERSION, the
 * version of the header. Never null, never to be freed.
 */
const char *floodmark_version(void);

/**
 * Which contract is this text? "call", "up-and-out cash put", "down one-touch", ... as in a book.
 *
 * Errors: FLOODMARK_STATUS_CONTRACT if the text is no contract; FLOODMARK_STATUS_NULL_POINTER.
 *
 * Memory: text is null or ends in a NUL; contract is null or writable.
 */
int32_t floodmark_contract_code(const char *text, uint8_t *contract);

/**
 * When is the rebate paid, by this text? "hit", "expiry", or "" for what is natural.
 *
 * Errors: FLOODMARK_STATUS_REBATE_PAID if the text is none of these; FLOODMARK_STATUS_NULL_POINTER.
 *
 * Memory: text is null or ends in a NUL; rebate_paid is null or writable.
 */
int32_t floodmark_rebate_paid_code(const char *text, uint8_t *rebate_paid);

/**
 * What is the text of this contract? buffer receives it with a NUL at its end, needed the size of both.
 *
 * Either of buffer and needed may be null: to ask for the size alone, or where the size is known.
 *
 * Errors: FLOODMARK_STATUS_CONTRACT if the code is no contract; FLOODMARK_STATUS_COLUMN_LENGTH if capacity is less
 * than the size (needed is then written, buffer is not); FLOODMARK_STATUS_NULL_POINTER if both are null.
 *
 * Memory: buffer is null or has capacity writable bytes; needed is null or aligned and writable.
 */
int32_t floodmark_contract_text(uint8_t contract,
                                char *buffer,
                                size_t capacity,
                                size_t *needed);

/**
 * What does this status say? The rule alone: "vol must be from 0 to 1000".
 *
 * A number that is no status has a sentence too. buffer, capacity, needed and the errors about them: as
 * floodmark_contract_text.
 *
 * Memory: As floodmark_contract_text.
 */
int32_t floodmark_status_text(int32_t status,
                              char *buffer,
                              size_t capacity,
                              size_t *needed);

/**
 * What does this status say about the value that was given? "vol must be from 0 to 1000, got -0.2".
 *
 * The value is left out where the status does not speak of one. buffer, capacity, needed and the errors about them:
 * as floodmark_contract_text.
 *
 * Memory: As floodmark_contract_text.
 */
int32_t floodmark_status_sentence(int32_t status,
                                  double value,
                                  char *buffer,
                                  size_t capacity,
                                  size_t *needed);

/**
 * What is a contract worth now?
 *
 * Formula: the expectation of what the contract pays, discounted at rate, under
 * dX = (rate - dividend) X dt + vol X dW, the barrier watched continuously.
 *
 * Domain: contract is a FLOODMARK_CONTRACT code and rebate_paid a FLOODMARK_REBATE_PAID code (hit only for
 * knock-outs and one-touches); spot, strike and barrier positive and finite; rebate (the amount of a touch) finite
 * and at least 0; expiry from 0 to 10000; vol from 0 to 1000; rate and dividend from -1000 to 1000. A number that
 * the contract has no use for is ignored, NaN included: the strike of a touch, the barrier and rebate of a
 * vanilla. The barrier is touched when the spot is at or beyond it, now included. expiry 0 and vol 0 are limits.
 *
 * Errors: the status of the first input out of its domain; FLOODMARK_STATUS_OVERFLOW where the answer is beyond
 * binary64; FLOODMARK_STATUS_NULL_POINTER if value is null. value is then left alone.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_price(uint8_t contract,
                        double spot,
                        double strike,
                        double barrier,
                        double rebate,
                        uint8_t rebate_paid,
                        double expiry,
                        double vol,
                        double rate,
                        double dividend,
                        double *value);

/**
 * What is a contract worth now, and how does that change with each input?
 *
 * Formula: the derivatives of floodmark_price, analytic, in one pass with the value; see FloodmarkGreeks. A
 * derivative whose magnitude is beyond binary64 is infinite.
 *
 * Domain and errors: as floodmark_price.
 *
 * Memory: greeks is null, or aligned and writable.
 */
int32_t floodmark_greeks(uint8_t contract,
                         double spot,
                         double strike,
                         double barrier,
                         double rebate,
                         uint8_t rebate_paid,
                         double expiry,
                         double vol,
                         double rate,
                         double dividend,
                         struct FloodmarkGreeks *greeks);

/**
 * How likely is the barrier touched, how far is it, and what is at stake there?
 *
 * Formula: see FloodmarkBarrierProfile; the gap, with f the payoff at a final spot equal to the barrier (half,
 * where a digital's strike is the barrier), is rebate - f for a knock-out, f - rebate for a knock-in, rebate for a
 * one-touch, -rebate for a no-touch.
 *
 * Domain and errors: as floodmark_price.
 *
 * Memory: profile is null, or aligned and writable.
 */
int32_t floodmark_barrier_profile(uint8_t contract,
                                  double spot,
                                  double strike,
                                  double barrier,
                                  double rebate,
                                  uint8_t rebate_paid,
                                  double expiry,
                                  double vol,
                                  double rate,
                                  double dividend,
                                  struct FloodmarkBarrierProfile *profile);

/**
 * What is each contract of a book worth now?
 *
 * Formula and domain: floodmark_price, row by row. Every row is written; a refused row gets NaN and its status.
 * refused, unless null, receives how many rows were refused.
 *
 * Errors of the call: FLOODMARK_STATUS_NULL_POINTER if book is null, or an input column, value or status is null
 * while there are rows; then nothing is written.
 *
 * Memory: Every address that the columns name must be aligned and readable or writable for as long as the call lasts; no
 * column of results may overlap another column. book and refused are null or aligned.
 */
int32_t floodmark_price_columns(const struct FloodmarkBook *book,
                                struct FloodmarkResults value,
                                struct FloodmarkStatuses status,
                                size_t *refused);

/**
 * What is each contract of a book worth now, and how does that change with each input?
 *
 * Formula and domain: floodmark_greeks, row by row, into the columns that are wanted. Rows are refused as in
 * floodmark_price_columns.
 *
 * Errors of the call: FLOODMARK_STATUS_NULL_POINTER if book or greeks is null, or an input column or status is
 * null while there are rows; then nothing is written.
 *
 * Memory: As floodmark_price_columns; greeks is null or aligned.
 */
int32_t floodmark_greeks_columns(const struct FloodmarkBook *book,
                                 const struct FloodmarkGreekColumns *greeks,
                                 struct FloodmarkStatuses status,
                                 size_t *refused);

/**
 * Where does each contract of a book stand against its barrier?
 *
 * Formula and domain: floodmark_barrier_profile, row by row, into the columns that are wanted. Rows are refused as
 * in floodmark_price_columns.
 *
 * Errors of the call: FLOODMARK_STATUS_NULL_POINTER if book or profile is null, or an input column or status is
 * null while there are rows; then nothing is written.
 *
 * Memory: As floodmark_price_columns; profile is null or aligned.
 */
int32_t floodmark_barrier_profile_columns(const struct FloodmarkBook *book,
                                          const struct FloodmarkProfileColumns *profile,
                                          struct FloodmarkStatuses status,
                                          size_t *refused);

/**
 * What is a contract worth now, and how far can that be from the value of the exact binary inputs?
 *
 * Formula: floodmark_price, with the sum of what the roundings of its terms can amount to. The bound speaks of
 * arithmetic alone, not of the model.
 *
 * Domain and errors: as floodmark_price.
 *
 * Memory: bounded is null, or aligned and writable.
 */
int32_t floodmark_bounded_price(uint8_t contract,
                                double spot,
                                double strike,
                                double barrier,
                                double rebate,
                                uint8_t rebate_paid,
                                double expiry,
                                double vol,
                                double rate,
                                double dividend,
                                struct FloodmarkBoundedPrice *bounded);

/**
 * What is a contract worth now, correct to the last place?
 *
 * Formula: floodmark_price in some 31 digits, rounded once: the oracle for audits and tests, at some microseconds
 * to milliseconds a call.
 *
 * Domain and errors: as floodmark_price.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_reference_price(uint8_t contract,
                                  double spot,
                                  double strike,
                                  double barrier,
                                  double rebate,
                                  uint8_t rebate_paid,
                                  double expiry,
                                  double vol,
                                  double rate,
                                  double dividend,
                                  double *value);

/**
 * What is a contract worth now, and how does that change with each input, from the reference path?
 *
 * Formula: floodmark_greeks in some 31 digits, rounded once.
 *
 * Domain and errors: as floodmark_price.
 *
 * Memory: greeks is null, or aligned and writable.
 */
int32_t floodmark_reference_greeks(uint8_t contract,
                                   double spot,
                                   double strike,
                                   double barrier,
                                   double rebate,
                                   uint8_t rebate_paid,
                                   double expiry,
                                   double vol,
                                   double rate,
                                   double dividend,
                                   struct FloodmarkGreeks *greeks);

/**
 * What is each contract of a book worth now, and how exact is each value?
 *
 * Formula and domain: floodmark_bounded_price, row by row. Rows are refused as in floodmark_price_columns.
 *
 * Errors of the call: FLOODMARK_STATUS_NULL_POINTER if book is null, or an input column, value, error_bound or
 * status is null while there are rows; then nothing is written.
 *
 * Memory: As floodmark_price_columns.
 */
int32_t floodmark_bounded_price_columns(const struct FloodmarkBook *book,
                                        struct FloodmarkResults value,
                                        struct FloodmarkResults error_bound,
                                        struct FloodmarkStatuses status,
                                        size_t *refused);

/**
 * How dense is the end point W_T at terminal?
 *
 * Formula: the density of the normal law with mean drift horizon and deviation vol sqrt(horizon).
 *
 * Domain: terminal from -1e75 to 1e75; drift from -1e75 to 1e75; vol and horizon from 1e-75 to 1e75.
 *
 * Errors: the status of the first input out of its domain; FLOODMARK_STATUS_OVERFLOW where the answer is beyond
 * binary64; FLOODMARK_STATUS_NULL_POINTER if value is null. value is then left alone.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_terminal_pdf(double drift,
                               double vol,
                               double horizon,
                               double terminal,
                               double *value);

/**
 * How likely does the motion end at or below terminal?
 *
 * Formula: P(W_T <= terminal).
 *
 * Domain: terminal from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_terminal_cdf(double drift,
                               double vol,
                               double horizon,
                               double terminal,
                               double *value);

/**
 * Below which point does the motion end with this probability?
 *
 * Formula: the terminal for which P(W_T <= terminal) = probability; infinite for 0 and 1.
 *
 * Domain: probability from 0 to 1; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_terminal_quantile(double drift,
                                    double vol,
                                    double horizon,
                                    double probability,
                                    double *value);

/**
 * How dense is the running maximum M_T at level?
 *
 * Formula: d/dlevel P(M_T <= level); 0 on the side of the start where the maximum cannot be.
 *
 * Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_max_pdf(double drift, double vol, double horizon, double level, double *value);

/**
 * How likely does the running maximum stay at or below level?
 *
 * Formula: P(M_T <= level).
 *
 * Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_max_cdf(double drift, double vol, double horizon, double level, double *value);

/**
 * How likely does the running maximum reach or lie above level?
 *
 * Formula: P(M_T >= level), not formed as 1 - P(M_T <= level).
 *
 * Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_max_tail(double drift, double vol, double horizon, double level, double *value);

/**
 * Below which level does the running maximum stay with this probability?
 *
 * Formula: the level for which P(M_T <= level) = probability; 0 at 0, infinite at 1.
 *
 * Domain: probability from 0 to 1; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_max_quantile(double drift,
                               double vol,
                               double horizon,
                               double probability,
                               double *value);

/**
 * How dense is the running minimum m_T at level?
 *
 * Formula: d/dlevel P(m_T <= level); 0 on the side of the start where the minimum cannot be.
 *
 * Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_min_pdf(double drift, double vol, double horizon, double level, double *value);

/**
 * How likely does the running minimum stay at or below level?
 *
 * Formula: P(m_T <= level).
 *
 * Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_min_cdf(double drift, double vol, double horizon, double level, double *value);

/**
 * How likely does the running minimum stay at or above level?
 *
 * Formula: P(m_T >= level), not formed as 1 - P(m_T <= level).
 *
 * Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_min_tail(double drift, double vol, double horizon, double level, double *value);

/**
 * Below which level does the running minimum stay with this probability?
 *
 * Formula: the level for which P(m_T <= level) = probability; minus infinity at 0, 0 at 1.
 *
 * Domain: probability from 0 to 1; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_min_quantile(double drift,
                               double vol,
                               double horizon,
                               double probability,
                               double *value);

/**
 * How likely does the motion end at or below terminal, its maximum at or below level?
 *
 * Formula: P(W_T <= terminal, M_T <= level).
 *
 * Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_joint_max_cdf(double drift,
                                double vol,
                                double horizon,
                                double terminal,
                                double level,
                                double *value);

/**
 * How dense are the end point at terminal and the maximum at level together?
 *
 * Formula: the joint density of (W_T, M_T); 0 where no path goes.
 *
 * Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_joint_max_pdf(double drift,
                                double vol,
                                double horizon,
                                double terminal,
                                double level,
                                double *value);

/**
 * How likely does the motion end at or below terminal, its minimum at or below level?
 *
 * Formula: P(W_T <= terminal, m_T <= level).
 *
 * Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_joint_min_cdf(double drift,
                                double vol,
                                double horizon,
                                double terminal,
                                double level,
                                double *value);

/**
 * How dense are the end point at terminal and the minimum at level together?
 *
 * Formula: the joint density of (W_T, m_T); 0 where no path goes.
 *
 * Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_joint_min_pdf(double drift,
                                double vol,
                                double horizon,
                                double terminal,
                                double level,
                                double *value);

/**
 * How likely is level not touched by the horizon?
 *
 * Formula: P(tau > horizon), with tau the first time at level; a level above 0 is watched from below, one below 0
 * from above; 0 for the level 0.
 *
 * Domain: level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_survival(double drift,
                           double vol,
                           double horizon,
                           double level,
                           double *value);

/**
 * How dense is the first passage through level at time?
 *
 * Formula: d/dtime P(tau <= time); the horizon plays no part.
 *
 * Domain: level from -1e75 to 1e75, not 0; time at least 0, infinite allowed; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_first_passage_pdf(double drift,
                                    double vol,
                                    double horizon,
                                    double level,
                                    double time,
                                    double *value);

/**
 * How likely is level touched by time?
 *
 * Formula: P(tau <= time); the horizon plays no part.
 *
 * Domain: level from -1e75 to 1e75; time at least 0, infinite allowed; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_first_passage_cdf(double drift,
                                    double vol,
                                    double horizon,
                                    double level,
                                    double time,
                                    double *value);

/**
 * By when is level touched with this probability?
 *
 * Formula: the time for which P(tau <= time) = probability; infinite where that is never reached.
 *
 * Domain: level from -1e75 to 1e75; probability from 0 to 1; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_first_passage_quantile(double drift,
                                         double vol,
                                         double horizon,
                                         double level,
                                         double probability,
                                         double *value);

/**
 * What is one unit worth that is paid when level is touched, if that is by the horizon?
 *
 * Formula: E[exp(-discount_rate tau); tau <= horizon], for a discount_rate of any sign.
 *
 * Domain: level and discount_rate from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_discounted_first_passage(double drift,
                                           double vol,
                                           double horizon,
                                           double level,
                                           double discount_rate,
                                           double *value);

/**
 * How likely was level touched on the way to a known end point?
 *
 * Formula: exp(-2 level (level - terminal) / (vol^2 horizon)); 1 where the end is at or beyond the level.
 *
 * Domain: terminal and level from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_bridge_crossing(double drift,
                                  double vol,
                                  double horizon,
                                  double terminal,
                                  double level,
                                  double *value);

/**
 * How much more likely is a path to terminal under another drift?
 *
 * Formula: dP_other/dP = exp(((other_drift - drift) terminal - (other_drift^2 - drift^2) horizon / 2) / vol^2).
 *
 * Domain: terminal and other_drift from -1e75 to 1e75; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_drift_weight(double drift,
                               double vol,
                               double horizon,
                               double terminal,
                               double other_drift,
                               double *value);

/**
 * Which end point does this uniform number draw?
 *
 * Formula: drift horizon + vol sqrt(horizon) N^-1(uniform).
 *
 * Domain: uniform strictly between 0 and 1; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_sample_terminal(double drift,
                                  double vol,
                                  double horizon,
                                  double uniform,
                                  double *value);

/**
 * Which maximum does this uniform number draw, given the end point?
 *
 * Formula: (terminal + sqrt(terminal^2 - 2 s^2 ln(uniform))) / 2, s = vol sqrt(horizon).
 *
 * Domain: terminal from -1e75 to 1e75; uniform strictly between 0 and 1; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_sample_max(double drift,
                             double vol,
                             double horizon,
                             double terminal,
                             double uniform,
                             double *value);

/**
 * Which minimum does this uniform number draw, given the end point?
 *
 * Formula: (terminal - sqrt(terminal^2 - 2 s^2 ln(uniform))) / 2, s = vol sqrt(horizon).
 *
 * Domain: terminal from -1e75 to 1e75; uniform strictly between 0 and 1; the law as in floodmark_terminal_pdf.
 *
 * Errors: as floodmark_terminal_pdf.
 *
 * Memory: value is null, or aligned and writable.
 */
int32_t floodmark_sample_min(double drift,
                             double vol,
                             double horizon,
                             double terminal,
                             double uniform,
                             double *value);

/**
 * What is this quantity of the law in each row?
 *
 * Formula: floodmark_max_cdf for FLOODMARK_QUANTITY_MAX_CDF and so on, row by row. Every row is written; a refused
 * row gets NaN and its status. refused, unless null, receives how many rows were refused.
 *
 * Domain: drift from -1e75 to 1e75; vol and horizon from 1e-75 to 1e75; the rest as the quantity's own function
 * says.
 *
 * Errors of the call: FLOODMARK_STATUS_QUANTITY if quantity is no FLOODMARK_QUANTITY code;
 * FLOODMARK_STATUS_NULL_POINTER if law is null, or an input column, value or status is null while there are rows;
 * then nothing is written.
 *
 * Memory: As floodmark_price_columns; law is null or aligned.
 */
int32_t floodmark_law_columns(uint8_t quantity,
                              const struct FloodmarkLawColumns *law,
                              struct FloodmarkResults value,
                              struct FloodmarkStatuses status,
                              size_t *refused);

#ifdef __cplusplus
}  // extern "C"
#endif  // __cplusplus

#endif  /* FLOODMARK_H */
