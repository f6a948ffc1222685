/*
 * Prints what the header claims, and checks what the library promises to a C program.
 *
 * CLAIMS is a file that tests/tests/c_door.rs makes, with a line for every constant and every member that it wants
 * printed. Everything else is checked here: a broken promise is printed and makes the program fail.
 */
#include <floodmark.h>

#include <math.h>
#include <stdio.h>
#include <string.h>

static int broken = 0;

#define CHECK(promise)                                                    \
    do {                                                                  \
        if (!(promise)) {                                                 \
            broken += 1;                                                  \
            printf("broken, line %d: %s\n", __LINE__, #promise);          \
        }                                                                 \
    } while (0)

/* One contract as plain numbers. */
struct inputs {
    uint8_t contract;
    uint8_t rebate_paid;
    double spot, strike, barrier, rebate, expiry, vol, rate, dividend;
};

static const struct inputs GOOD = {
    FLOODMARK_CONTRACT_UP_AND_OUT_CALL, FLOODMARK_REBATE_PAID_NATURAL, 105.0, 100.0, 130.0, 3.0, 0.5, 0.2, -0.01, 0.02,
};

static const double UNTOUCHED = -12345.678;

static int same(double a, double b) { return memcmp(&a, &b, sizeof a) == 0; }

static int32_t price(struct inputs i, double *value) {
    return floodmark_price(i.contract, i.spot, i.strike, i.barrier, i.rebate, i.rebate_paid, i.expiry, i.vol, i.rate,
                           i.dividend, value);
}

static int32_t greeks(struct inputs i, FloodmarkGreeks *out) {
    return floodmark_greeks(i.contract, i.spot, i.strike, i.barrier, i.rebate, i.rebate_paid, i.expiry, i.vol, i.rate,
                            i.dividend, out);
}

static int32_t profile(struct inputs i, FloodmarkBarrierProfile *out) {
    return floodmark_barrier_profile(i.contract, i.spot, i.strike, i.barrier, i.rebate, i.rebate_paid, i.expiry, i.vol,
                                     i.rate, i.dividend, out);
}

static int32_t bounded_price(struct inputs i, FloodmarkBoundedPrice *out) {
    return floodmark_bounded_price(i.contract, i.spot, i.strike, i.barrier, i.rebate, i.rebate_paid, i.expiry, i.vol,
                                   i.rate, i.dividend, out);
}

static int32_t reference_price(struct inputs i, double *value) {
    return floodmark_reference_price(i.contract, i.spot, i.strike, i.barrier, i.rebate, i.rebate_paid, i.expiry, i.vol,
                                     i.rate, i.dividend, value);
}

static int32_t reference_greeks(struct inputs i, FloodmarkGreeks *out) {
    return floodmark_reference_greeks(i.contract, i.spot, i.strike, i.barrier, i.rebate, i.rebate_paid, i.expiry, i.vol,
                                      i.rate, i.dividend, out);
}

static void print_claims(void) {
#define CONSTANT(name) printf(#name " %ld\n", (long)(name))
#define SIZE(type) printf("sizeof " #type " %zu\n", sizeof(type))
#define MEMBER(type, member) printf("offsetof " #type " " #member " %zu\n", offsetof(type, member))
#include CLAIMS
    printf("FLOODMARK_VERSION %s\n", FLOODMARK_VERSION);
    printf("floodmark_version %s\n", floodmark_version());
}

static void a_good_contract_is_answered(void) {
    double value = UNTOUCHED;
    FloodmarkGreeks risk;
    FloodmarkBarrierProfile stand;
    CHECK(price(GOOD, &value) == FLOODMARK_STATUS_OK);
    CHECK(value > 0.0 && value < GOOD.spot);
    CHECK(greeks(GOOD, &risk) == FLOODMARK_STATUS_OK);
    CHECK(same(risk.value, value));
    CHECK(profile(GOOD, &stand) == FLOODMARK_STATUS_OK);
    CHECK(stand.touch_probability > 0.0 && stand.touch_probability < 1.0);
    CHECK(stand.distance > 0.0);
    CHECK(stand.gap == GOOD.rebate - (GOOD.barrier - GOOD.strike));

    struct inputs plain = GOOD, odd = GOOD;
    plain.contract = odd.contract = FLOODMARK_CONTRACT_PUT;
    odd.barrier = odd.rebate = NAN;
    double other = UNTOUCHED;
    CHECK(price(plain, &value) == FLOODMARK_STATUS_OK && price(odd, &other) == FLOODMARK_STATUS_OK);
    CHECK(same(value, other));
}

/* Contracts that are refused, each with the status that says why. */
struct refusal {
    int32_t status;
    struct inputs inputs;
};

#define REFUSALS 17

static void make_refusals(struct refusal list[REFUSALS]) {
    for (int n = 0; n < REFUSALS; n += 1) {
        list[n].inputs = GOOD;
    }
    int n = 0;
#define REFUSE(member, given, because)   \
    do {                                 \
        list[n].inputs.member = (given); \
        list[n].status = (because);      \
        n += 1;                          \
    } while (0)
    REFUSE(contract, 44, FLOODMARK_STATUS_CONTRACT);
    REFUSE(contract, 255, FLOODMARK_STATUS_CONTRACT);
    REFUSE(rebate_paid, 3, FLOODMARK_STATUS_REBATE_PAID);
    list[n].inputs.contract = FLOODMARK_CONTRACT_UP_AND_IN_CALL;
    REFUSE(rebate_paid, FLOODMARK_REBATE_PAID_HIT, FLOODMARK_STATUS_REBATE_AT_HIT);
    REFUSE(spot, 0.0, FLOODMARK_STATUS_SPOT);
    REFUSE(spot, INFINITY, FLOODMARK_STATUS_SPOT);
    REFUSE(spot, NAN, FLOODMARK_STATUS_SPOT);
    REFUSE(strike, -1.0, FLOODMARK_STATUS_STRIKE);
    REFUSE(barrier, NAN, FLOODMARK_STATUS_BARRIER);
    REFUSE(rebate, -3.0, FLOODMARK_STATUS_REBATE);
    REFUSE(expiry, -0.5, FLOODMARK_STATUS_EXPIRY);
    REFUSE(expiry, 1e9, FLOODMARK_STATUS_EXPIRY);
    REFUSE(vol, -0.2, FLOODMARK_STATUS_VOL);
    REFUSE(vol, INFINITY, FLOODMARK_STATUS_VOL);
    REFUSE(rate, NAN, FLOODMARK_STATUS_RATE);
    REFUSE(dividend, 2000.0, FLOODMARK_STATUS_DIVIDEND);
    list[n].inputs.contract = FLOODMARK_CONTRACT_ASSET;
    list[n].inputs.expiry = 1e4;
    REFUSE(dividend, -900.0, FLOODMARK_STATUS_OVERFLOW);
    CHECK(n == REFUSALS);
}

static void a_refusal_is_a_status_and_leaves_the_output_alone(void) {
    struct refusal list[REFUSALS];
    make_refusals(list);
    for (int n = 0; n < REFUSALS; n += 1) {
        double value = UNTOUCHED;
        CHECK(price(list[n].inputs, &value) == list[n].status);
        CHECK(same(value, UNTOUCHED));

        FloodmarkGreeks risk, before;
        memset(&risk, 0xA5, sizeof risk);
        memcpy(&before, &risk, sizeof risk);
        CHECK(greeks(list[n].inputs, &risk) == list[n].status);
        CHECK(memcmp(&before, &risk, sizeof risk) == 0);

        if (list[n].status != FLOODMARK_STATUS_OVERFLOW) {
            FloodmarkBarrierProfile stand, untouched;
            memset(&stand, 0xA5, sizeof stand);
            memcpy(&untouched, &stand, sizeof stand);
            CHECK(profile(list[n].inputs, &stand) == list[n].status);
            CHECK(memcmp(&untouched, &stand, sizeof stand) == 0);
        }
    }
}

static void nowhere_to_write_is_a_status(void) {
    CHECK(price(GOOD, NULL) == FLOODMARK_STATUS_NULL_POINTER);
    CHECK(greeks(GOOD, NULL) == FLOODMARK_STATUS_NULL_POINTER);
    CHECK(profile(GOOD, NULL) == FLOODMARK_STATUS_NULL_POINTER);
}

#define ROWS 7

/* A row as a program that knows nothing of columns would keep it: a book of these is read in place, by strides. */
struct row {
    uint8_t contract;
    uint8_t rebate_paid;
    double spot, strike, barrier, rebate, expiry, vol, rate, dividend;
    double value;
    int32_t status;
    int32_t mark;
};

#define NUMBERS(rows, member) \
    { &(rows)->member, (ptrdiff_t)(sizeof *(rows) / sizeof(double)) }
#define CODES(rows, member) \
    { &(rows)->member, (ptrdiff_t)sizeof *(rows) }

static FloodmarkBook book_of(const struct row *rows, size_t count) {
    FloodmarkBook book = {
        .rows = count,
        .contract = CODES(rows, contract),
        .spot = NUMBERS(rows, spot),
        .strike = NUMBERS(rows, strike),
        .barrier = NUMBERS(rows, barrier),
        .rebate = NUMBERS(rows, rebate),
        .rebate_paid = CODES(rows, rebate_paid),
        .expiry = NUMBERS(rows, expiry),
        .vol = NUMBERS(rows, vol),
        .rate = NUMBERS(rows, rate),
        .dividend = NUMBERS(rows, dividend),
    };
    return book;
}

static struct inputs inputs_of(struct row row) {
    struct inputs inputs = {
        row.contract, row.rebate_paid, row.spot, row.strike, row.barrier, row.rebate, row.expiry, row.vol, row.rate,
        row.dividend,
    };
    return inputs;
}

/* Mixed contracts; row 3 is bad and stands between good neighbours. */
static void make_rows(struct row rows[ROWS]) {
    static const uint8_t contracts[ROWS] = {
        FLOODMARK_CONTRACT_UP_AND_OUT_CALL,
        FLOODMARK_CONTRACT_PUT,
        FLOODMARK_CONTRACT_DOWN_AND_IN_ASSET_CALL,
        FLOODMARK_CONTRACT_UP_AND_IN_PUT,
        FLOODMARK_CONTRACT_DOWN_ONE_TOUCH,
        FLOODMARK_CONTRACT_UP_NO_TOUCH,
        FLOODMARK_CONTRACT_CASH,
    };
    for (int n = 0; n < ROWS; n += 1) {
        struct row row = {contracts[n],        0,           101.0 + n, 95.0 + 2 * n, n % 2 ? 140.0 : 80.0, 0.25 * n,
                          0.1 + 0.3 * n, 0.1 + 0.05 * n, 0.03 - 0.01 * n, 0.01 * n,     UNTOUCHED,            -1,
                          n};
        rows[n] = row;
    }
    rows[0].barrier = 150.0;
    rows[3].vol = -0.2;
}

static void a_book_is_read_in_place_and_a_bad_row_harms_no_other(void) {
    struct row rows[ROWS];
    make_rows(rows);
    FloodmarkBook book = book_of(rows, ROWS);
    FloodmarkResults value = {&rows->value, (ptrdiff_t)(sizeof *rows / sizeof(double))};
    FloodmarkStatuses status = {&rows->status, (ptrdiff_t)(sizeof *rows / sizeof(int32_t))};
    size_t refused = 99;
    CHECK(floodmark_price_columns(&book, value, status, &refused) == FLOODMARK_STATUS_OK);
    CHECK(refused == 1);
    for (int n = 0; n < ROWS; n += 1) {
        double alone = UNTOUCHED;
        CHECK(price(inputs_of(rows[n]), &alone) == rows[n].status);
        CHECK(rows[n].status == (n == 3 ? FLOODMARK_STATUS_VOL : FLOODMARK_STATUS_OK));
        CHECK(n == 3 ? isnan(rows[n].value) : same(rows[n].value, alone));
        CHECK(rows[n].mark == n);
    }
    CHECK(floodmark_price_columns(&book, value, status, NULL) == FLOODMARK_STATUS_OK);
}

static void results_go_backwards_and_leave_gaps_alone(void) {
    struct row rows[ROWS];
    make_rows(rows);
    FloodmarkBook book = book_of(rows, ROWS);
    double forward[ROWS], backward[3 * ROWS];
    int32_t first[ROWS], second[ROWS];
    FloodmarkResults straight = {forward, 1}, reversed = {backward + 3 * (ROWS - 1), -3};
    FloodmarkStatuses ahead = {first, 1}, behind = {second + ROWS - 1, -1};
    for (int n = 0; n < 3 * ROWS; n += 1) {
        backward[n] = UNTOUCHED;
    }
    CHECK(floodmark_price_columns(&book, straight, ahead, NULL) == FLOODMARK_STATUS_OK);
    CHECK(floodmark_price_columns(&book, reversed, behind, NULL) == FLOODMARK_STATUS_OK);
    for (int n = 0; n < ROWS; n += 1) {
        CHECK(same(forward[n], backward[3 * (ROWS - 1 - n)]));
        CHECK(first[n] == second[ROWS - 1 - n]);
        CHECK(same(backward[3 * n + 1], UNTOUCHED) && same(backward[3 * n + 2], UNTOUCHED));
    }
}

static void one_number_stands_in_every_row_and_inputs_are_read_backwards(void) {
    double spots[ROWS], values[ROWS], fixed[8] = {100.0, 130.0, 3.0, 0.5, 0.2, -0.01, 0.02, 0.0};
    uint8_t contract = FLOODMARK_CONTRACT_UP_AND_OUT_CALL, paid = FLOODMARK_REBATE_PAID_EXPIRY;
    int32_t statuses[ROWS];
    for (int n = 0; n < ROWS; n += 1) {
        spots[n] = 90.0 + 7.0 * n;
    }
    FloodmarkBook book = {
        ROWS,          {&contract, 0}, {spots + ROWS - 1, -1}, {&fixed[0], 0}, {&fixed[1], 0}, {&fixed[2], 0},
        {&paid, 0},    {&fixed[3], 0}, {&fixed[4], 0},         {&fixed[5], 0}, {&fixed[6], 0},
    };
    FloodmarkResults value = {values, 1};
    FloodmarkStatuses status = {statuses, 1};
    CHECK(floodmark_price_columns(&book, value, status, NULL) == FLOODMARK_STATUS_OK);
    for (int n = 0; n < ROWS; n += 1) {
        struct inputs row = GOOD;
        row.spot = spots[ROWS - 1 - n];
        row.rebate_paid = paid;
        double alone = UNTOUCHED;
        CHECK(price(row, &alone) == FLOODMARK_STATUS_OK && statuses[n] == FLOODMARK_STATUS_OK);
        CHECK(same(values[n], alone));
    }
}

static void only_wanted_columns_are_written(void) {
    struct row rows[ROWS];
    make_rows(rows);
    FloodmarkBook book = book_of(rows, ROWS);
    double delta[ROWS], charm[ROWS], gap[ROWS];
    int32_t statuses[ROWS];
    FloodmarkStatuses status = {statuses, 1};
    FloodmarkGreekColumns risk = {.delta = {delta, 1}, .charm = {charm, 1}};
    FloodmarkProfileColumns stand = {.gap = {gap, 1}};
    size_t refused = 0;
    CHECK(floodmark_greeks_columns(&book, &risk, status, &refused) == FLOODMARK_STATUS_OK && refused == 1);
    CHECK(floodmark_barrier_profile_columns(&book, &stand, status, &refused) == FLOODMARK_STATUS_OK && refused == 1);
    for (int n = 0; n < ROWS; n += 1) {
        FloodmarkGreeks alone;
        FloodmarkBarrierProfile at;
        if (n == 3) {
            CHECK(isnan(delta[n]) && isnan(charm[n]) && isnan(gap[n]) && statuses[n] == FLOODMARK_STATUS_VOL);
            continue;
        }
        CHECK(greeks(inputs_of(rows[n]), &alone) == FLOODMARK_STATUS_OK);
        CHECK(profile(inputs_of(rows[n]), &at) == FLOODMARK_STATUS_OK);
        CHECK(same(delta[n], alone.delta) && same(charm[n], alone.charm) && same(gap[n], at.gap));
    }
}

static void a_missing_column_is_refused_before_anything_is_written(void) {
    struct row rows[ROWS];
    make_rows(rows);
    FloodmarkBook book = book_of(rows, ROWS);
    FloodmarkResults value = {&rows->value, (ptrdiff_t)(sizeof *rows / sizeof(double))}, no_value = {NULL, 1};
    FloodmarkStatuses status = {&rows->status, (ptrdiff_t)(sizeof *rows / sizeof(int32_t))}, no_status = {NULL, 1};
    FloodmarkGreekColumns risk = {.value = value};
    FloodmarkProfileColumns stand = {.gap = value};
    size_t refused = 99;
    const int32_t null = FLOODMARK_STATUS_NULL_POINTER;
    CHECK(floodmark_price_columns(NULL, value, status, &refused) == null);
    CHECK(floodmark_price_columns(&book, no_value, status, &refused) == null);
    CHECK(floodmark_price_columns(&book, value, no_status, &refused) == null);
    CHECK(floodmark_greeks_columns(NULL, &risk, status, &refused) == null);
    CHECK(floodmark_greeks_columns(&book, NULL, status, &refused) == null);
    CHECK(floodmark_greeks_columns(&book, &risk, no_status, &refused) == null);
    CHECK(floodmark_barrier_profile_columns(NULL, &stand, status, &refused) == null);
    CHECK(floodmark_barrier_profile_columns(&book, NULL, status, &refused) == null);
    CHECK(floodmark_barrier_profile_columns(&book, &stand, no_status, &refused) == null);
#define WITHOUT(column)                                                          \
    do {                                                                         \
        FloodmarkBook partial = book;                                            \
        partial.column.first = NULL;                                             \
        CHECK(floodmark_price_columns(&partial, value, status, &refused) == null); \
    } while (0)
    WITHOUT(contract);
    WITHOUT(spot);
    WITHOUT(strike);
    WITHOUT(barrier);
    WITHOUT(rebate);
    WITHOUT(rebate_paid);
    WITHOUT(expiry);
    WITHOUT(vol);
    WITHOUT(rate);
    WITHOUT(dividend);
    CHECK(refused == 99);
    for (int n = 0; n < ROWS; n += 1) {
        CHECK(same(rows[n].value, UNTOUCHED) && rows[n].status == -1);
    }
}

static void a_book_without_rows_needs_no_columns(void) {
    FloodmarkBook book;
    memset(&book, 0, sizeof book);
    FloodmarkResults value = {NULL, 0};
    FloodmarkStatuses status = {NULL, 0};
    size_t refused = 99;
    CHECK(floodmark_price_columns(&book, value, status, &refused) == FLOODMARK_STATUS_OK && refused == 0);
}

static void every_contract_has_a_text_that_leads_back(void) {
    for (unsigned code = 0; code < 256; code += 1) {
        char text[64];
        size_t size = 0;
        uint8_t back = 200;
        memset(text, 'x', sizeof text);
        if (code > FLOODMARK_CONTRACT_DOWN_NO_TOUCH) {
            CHECK(floodmark_contract_text((uint8_t)code, text, sizeof text, &size) == FLOODMARK_STATUS_CONTRACT);
            CHECK(size == 0 && text[0] == 'x');
            continue;
        }
        CHECK(floodmark_contract_text((uint8_t)code, text, sizeof text, &size) == FLOODMARK_STATUS_OK);
        CHECK(size == strlen(text) + 1 && text[size] == 'x');
        CHECK(floodmark_contract_code(text, &back) == FLOODMARK_STATUS_OK && back == code);
        printf("contract %u %s\n", code, text);
    }
    uint8_t code = 200;
    CHECK(floodmark_contract_code("up-and-over call", &code) == FLOODMARK_STATUS_CONTRACT && code == 200);
    CHECK(floodmark_contract_code("", &code) == FLOODMARK_STATUS_CONTRACT && code == 200);
    CHECK(floodmark_contract_code("call\xff", &code) == FLOODMARK_STATUS_CONTRACT && code == 200);
    CHECK(floodmark_contract_code(NULL, &code) == FLOODMARK_STATUS_NULL_POINTER && code == 200);
    CHECK(floodmark_contract_code("call", NULL) == FLOODMARK_STATUS_NULL_POINTER);
}

static void a_rebate_is_paid_at_hit_at_expiry_or_as_is_natural(void) {
    uint8_t code = 200;
    CHECK(floodmark_rebate_paid_code("later", &code) == FLOODMARK_STATUS_REBATE_PAID && code == 200);
    CHECK(floodmark_rebate_paid_code(NULL, &code) == FLOODMARK_STATUS_NULL_POINTER && code == 200);
    CHECK(floodmark_rebate_paid_code("hit", NULL) == FLOODMARK_STATUS_NULL_POINTER);
    CHECK(floodmark_rebate_paid_code("hit", &code) == FLOODMARK_STATUS_OK && code == FLOODMARK_REBATE_PAID_HIT);
    CHECK(floodmark_rebate_paid_code("expiry", &code) == FLOODMARK_STATUS_OK && code == FLOODMARK_REBATE_PAID_EXPIRY);
    CHECK(floodmark_rebate_paid_code("", &code) == FLOODMARK_STATUS_OK && code == FLOODMARK_REBATE_PAID_NATURAL);
}

static void a_text_that_does_not_fit_is_not_cut(void) {
    char text[16];
    size_t size = 0;
    memset(text, 'x', sizeof text);
    CHECK(floodmark_contract_text(FLOODMARK_CONTRACT_PUT, text, 3, &size) == FLOODMARK_STATUS_COLUMN_LENGTH);
    CHECK(size == 4 && text[0] == 'x');
    CHECK(floodmark_contract_text(FLOODMARK_CONTRACT_PUT, text, 4, NULL) == FLOODMARK_STATUS_OK);
    CHECK(strcmp(text, "put") == 0 && text[4] == 'x');
    CHECK(floodmark_contract_text(FLOODMARK_CONTRACT_CASH_PUT, NULL, 0, &size) == FLOODMARK_STATUS_OK && size == 9);
    CHECK(floodmark_contract_text(FLOODMARK_CONTRACT_PUT, NULL, 0, NULL) == FLOODMARK_STATUS_NULL_POINTER);
}

static void a_status_is_a_sentence(void) {
    char text[128];
    CHECK(floodmark_status_text(FLOODMARK_STATUS_VOL, text, sizeof text, NULL) == FLOODMARK_STATUS_OK);
    CHECK(strcmp(text, "vol must be from 0 to 1000") == 0);
    CHECK(floodmark_status_sentence(FLOODMARK_STATUS_VOL, -0.2, text, sizeof text, NULL) == FLOODMARK_STATUS_OK);
    CHECK(strcmp(text, "vol must be from 0 to 1000, got -0.2") == 0);
    CHECK(floodmark_status_sentence(FLOODMARK_STATUS_OK, 1.0, text, sizeof text, NULL) == FLOODMARK_STATUS_OK);
    CHECK(strcmp(text, "ok") == 0);
    CHECK(floodmark_status_sentence(77, 1.0, text, sizeof text, NULL) == FLOODMARK_STATUS_OK);
    CHECK(strcmp(text, "status 77 is not one that is known") == 0);
    CHECK(floodmark_status_text(-1, text, sizeof text, NULL) == FLOODMARK_STATUS_OK);
    CHECK(strcmp(text, "status -1 is not one that is known") == 0);
    CHECK(floodmark_status_text(FLOODMARK_STATUS_VOL, text, 5, NULL) == FLOODMARK_STATUS_COLUMN_LENGTH);
    CHECK(floodmark_status_sentence(FLOODMARK_STATUS_VOL, 1.0, NULL, 0, NULL) == FLOODMARK_STATUS_NULL_POINTER);
}

static void a_law_answers_one_by_one_and_in_columns(void) {
    double drifts[ROWS], levels[2 * ROWS], values[ROWS];
    int32_t statuses[ROWS];
    const double vol = 0.3, horizon = 2.0;
    for (int n = 0; n < ROWS; n += 1) {
        drifts[n] = 0.05 * (n - 3);
        levels[2 * n] = 0.1 + 0.1 * n;
        levels[2 * n + 1] = NAN;
    }
    drifts[3] = NAN;
    FloodmarkLawColumns law = {ROWS, {drifts, 1}, {&vol, 0}, {&horizon, 0}, {levels, 2}, {NULL, 0}};
    FloodmarkResults value = {values, 1};
    FloodmarkStatuses status = {statuses, 1};
    size_t refused = 99;
    CHECK(floodmark_law_columns(FLOODMARK_QUANTITY_MAX_CDF, &law, value, status, &refused) == FLOODMARK_STATUS_OK);
    CHECK(refused == 1);
    for (int n = 0; n < ROWS; n += 1) {
        double alone = UNTOUCHED;
        CHECK(floodmark_max_cdf(drifts[n], vol, horizon, levels[2 * n], &alone) == statuses[n]);
        CHECK(statuses[n] == (n == 3 ? FLOODMARK_STATUS_DRIFT : FLOODMARK_STATUS_OK));
        CHECK(n == 3 ? isnan(values[n]) && same(alone, UNTOUCHED) : same(values[n], alone));
    }

    const int32_t null = FLOODMARK_STATUS_NULL_POINTER;
    FloodmarkResults no_value = {NULL, 1};
    FloodmarkStatuses no_status = {NULL, 1};
    values[0] = UNTOUCHED;
    refused = 99;
    CHECK(floodmark_law_columns(25, &law, value, status, &refused) == FLOODMARK_STATUS_QUANTITY);
    CHECK(floodmark_law_columns(FLOODMARK_QUANTITY_MAX_CDF, NULL, value, status, &refused) == null);
    CHECK(floodmark_law_columns(FLOODMARK_QUANTITY_MAX_CDF, &law, no_value, status, &refused) == null);
    CHECK(floodmark_law_columns(FLOODMARK_QUANTITY_MAX_CDF, &law, value, no_status, &refused) == null);
    CHECK(floodmark_law_columns(FLOODMARK_QUANTITY_JOINT_MAX_CDF, &law, value, status, &refused) == null);
    CHECK(floodmark_max_cdf(0.0, vol, horizon, 0.1, NULL) == null);
    CHECK(same(values[0], UNTOUCHED) && refused == 99);
    law.rows = 0;
    CHECK(floodmark_law_columns(FLOODMARK_QUANTITY_MAX_CDF, &law, no_value, no_status, NULL) == FLOODMARK_STATUS_OK);
}

static void a_price_is_within_its_bound_of_the_reference(void) {
    struct row rows[ROWS];
    double values[ROWS], bounds[ROWS];
    int32_t statuses[ROWS];
    make_rows(rows);
    FloodmarkBook book = book_of(rows, ROWS);
    FloodmarkResults value = {values, 1}, bound = {bounds, 1}, nowhere = {NULL, 1};
    FloodmarkStatuses status = {statuses, 1};
    size_t refused = 99;
    CHECK(floodmark_bounded_price_columns(&book, value, bound, status, &refused) == FLOODMARK_STATUS_OK);
    CHECK(refused == 1);
    CHECK(floodmark_bounded_price_columns(&book, value, nowhere, status, NULL) == FLOODMARK_STATUS_NULL_POINTER);
    CHECK(floodmark_bounded_price_columns(NULL, value, bound, status, NULL) == FLOODMARK_STATUS_NULL_POINTER);
    for (int n = 0; n < ROWS; n += 1) {
        FloodmarkBoundedPrice bounded = {UNTOUCHED, UNTOUCHED};
        FloodmarkGreeks risk;
        double exact = UNTOUCHED, fast = UNTOUCHED;
        risk.value = UNTOUCHED;
        int32_t expected = n == 3 ? FLOODMARK_STATUS_VOL : FLOODMARK_STATUS_OK;
        CHECK(statuses[n] == expected);
        CHECK(bounded_price(inputs_of(rows[n]), &bounded) == expected);
        CHECK(reference_price(inputs_of(rows[n]), &exact) == expected);
        CHECK(reference_greeks(inputs_of(rows[n]), &risk) == expected);
        CHECK(price(inputs_of(rows[n]), &fast) == expected);
        CHECK(same(bounded.value, fast) && same(risk.value, exact));
        if (n == 3) {
            CHECK(same(bounded.value, UNTOUCHED) && same(bounded.error_bound, UNTOUCHED) && same(exact, UNTOUCHED));
            CHECK(isnan(values[n]) && isnan(bounds[n]));
        } else {
            CHECK(same(values[n], bounded.value) && same(bounds[n], bounded.error_bound));
            CHECK(fabs(fast - exact) <= bounded.error_bound && bounded.error_bound < 1e-10);
        }
    }
    double exact = UNTOUCHED;
    CHECK(bounded_price(GOOD, NULL) == FLOODMARK_STATUS_NULL_POINTER);
    CHECK(reference_price(GOOD, NULL) == FLOODMARK_STATUS_NULL_POINTER);
    CHECK(reference_greeks(GOOD, NULL) == FLOODMARK_STATUS_NULL_POINTER);
    CHECK(reference_price(GOOD, &exact) == FLOODMARK_STATUS_OK && exact > 0.0);
}

int main(void) {
    print_claims();
    a_good_contract_is_answered();
    a_refusal_is_a_status_and_leaves_the_output_alone();
    nowhere_to_write_is_a_status();
    a_book_is_read_in_place_and_a_bad_row_harms_no_other();
    results_go_backwards_and_leave_gaps_alone();
    one_number_stands_in_every_row_and_inputs_are_read_backwards();
    only_wanted_columns_are_written();
    a_missing_column_is_refused_before_anything_is_written();
    a_book_without_rows_needs_no_columns();
    a_law_answers_one_by_one_and_in_columns();
    a_price_is_within_its_bound_of_the_reference();
    every_contract_has_a_text_that_leads_back();
    a_rebate_is_paid_at_hit_at_expiry_or_as_is_natural();
    a_text_that_does_not_fit_is_not_cut();
    a_status_is_a_sentence();
    printf("broken promises %d\n", broken);
    return broken == 0 ? 0 : 1;
}
