package nightlag.pipeline.config;

import com.ezylang.evalex.BaseException;
import com.ezylang.evalex.Expression;
import com.ezylang.evalex.config.ExpressionConfiguration;
import com.ezylang.evalex.config.MapBasedFunctionDictionary;
import com.ezylang.evalex.config.MapBasedOperatorDictionary;
import com.ezylang.evalex.functions.FunctionIfc;
import com.ezylang.evalex.functions.basic.AbsFunction;
import com.ezylang.evalex.functions.basic.IfFunction;
import com.ezylang.evalex.functions.basic.Log10Function;
import com.ezylang.evalex.functions.basic.LogFunction;
import com.ezylang.evalex.functions.basic.MaxFunction;
import com.ezylang.evalex.functions.basic.MinFunction;
import com.ezylang.evalex.functions.basic.SqrtFunction;
import com.ezylang.evalex.functions.trigonometric.AcosFunction;
import com.ezylang.evalex.functions.trigonometric.AsinFunction;
import com.ezylang.evalex.functions.trigonometric.AtanFunction;
import com.ezylang.evalex.functions.trigonometric.CosFunction;
import com.ezylang.evalex.functions.trigonometric.SinFunction;
import com.ezylang.evalex.functions.trigonometric.TanFunction;
import com.ezylang.evalex.operators.OperatorIfc;
import com.ezylang.evalex.operators.arithmetic.InfixDivisionOperator;
import com.ezylang.evalex.operators.arithmetic.InfixMinusOperator;
import com.ezylang.evalex.operators.arithmetic.InfixMultiplicationOperator;
import com.ezylang.evalex.operators.arithmetic.InfixPlusOperator;
import com.ezylang.evalex.operators.arithmetic.InfixPowerOfOperator;
import com.ezylang.evalex.operators.arithmetic.PrefixMinusOperator;
import com.ezylang.evalex.operators.arithmetic.PrefixPlusOperator;
import com.ezylang.evalex.operators.booleans.InfixGreaterEqualsOperator;
import com.ezylang.evalex.operators.booleans.InfixGreaterOperator;
import com.ezylang.evalex.operators.booleans.InfixLessEqualsOperator;
import com.ezylang.evalex.operators.booleans.InfixLessOperator;
import com.ezylang.evalex.parser.ASTNode;
import com.ezylang.evalex.parser.Token;
import java.util.Arrays;
import java.util.Comparator;
import java.util.EnumSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import nightlag.stages.moduli.PointFunction;
import nightlag.stages.moduli.PointQuantity;

/**
 * An expression over the quantities of a point, compiled. The library reads it; the tree it makes is turned into arithmetic
 * on doubles here, once, since the library's own arithmetic is decimal, a thousand times slower, and lets a tower of powers
 * run for minutes. There are no loops, no names but those of quantities and no text, so an expression ends.
 */
final class PointExpression {
    /** Longer ones are mistakes. */
    static final int LONGEST = 400;

    private static final String ALLOWED_SIGNS = "numbers with a decimal point, + - * / ^ ( ) and < <= > >= within if";
    private static final Pattern SIGNED_POWER = Pattern.compile("\\^\\s*+[-+]");
    private static final Map<String, Double> CONSTANTS = Map.of("pi", Math.PI, "e", Math.E);
    private static final Map<String, FunctionIfc> FUNCTIONS = functions();
    private static final ExpressionConfiguration LANGUAGE = language();

    private final Set<PointQuantity> uses = EnumSet.noneOf(PointQuantity.class);

    private PointExpression() {}

    /**
     * What came of it.
     *
     * @param uses the quantities it names, in their own order
     * @param function the expression at work
     */
    record Compiled(List<PointQuantity> uses, PointFunction function) {}

    /** A piece of the tree: a number, or, where {@code truth}, a comparison that is 1 or 0. */
    private record Term(boolean truth, PointFunction value) {}

    /** Something in the tree that is not allowed. */
    private static final class NotAllowedException extends Exception {
        private static final long serialVersionUID = 1L;
        private final String allowed;

        NotAllowedException(String found, String allowed) {
            super(found);
            this.allowed = allowed;
        }
    }

    /** Compiles an expression, or says what is wrong with it and what is allowed. */
    static Parsed<Compiled> compile(String text) {
        if (text.length() > LONGEST) {
            return new Parsed.Refused<>(
                    "the expression is " + text.length() + " characters long", "at most " + LONGEST + " characters");
        }
        try {
            PointExpression expression = new PointExpression();
            Term whole = expression.term(new Expression(text, LANGUAGE).getAbstractSyntaxTree());
            if (whole.truth()) {
                throw new NotAllowedException(
                        "it is true or false, not a number", "a number, such as if(tan_delta > 1, 1, 0)");
            }
            if (expression.uses.isEmpty()) {
                throw new NotAllowedException("it names no quantity of a point", "one at least of " + names());
            }
            return new Parsed.Value<>(new Compiled(List.copyOf(expression.uses), whole.value()));
        } catch (NotAllowedException e) {
            return new Parsed.Refused<>(e.getMessage(), e.allowed);
        } catch (BaseException e) {
            return SIGNED_POWER.matcher(text).find()
                    ? new Parsed.Refused<>("a power begins with a sign", "brackets round it, such as tan_delta^(-1)")
                    : refused(e);
        }
    }

    private static Parsed<Compiled> refused(BaseException e) {
        String message = e.getMessage();
        if (message.startsWith("Undefined function")) {
            String typed = e.getTokenString().toLowerCase(Locale.ROOT);
            if (typed.equals("log")) {
                return new Parsed.Refused<>("log does not say to which base", "ln or log10");
            }
            return new Parsed.Refused<>(
                    "no function is called '" + Node.shown(typed) + "'" + Suggestion.clause(typed, FUNCTIONS.keySet()),
                    "one of " + String.join(", ", FUNCTIONS.keySet()));
        }
        return new Parsed.Refused<>(
                "at character " + e.getStartPosition() + ": "
                        + message.substring(0, 1).toLowerCase(Locale.ROOT) + Node.shown(message.substring(1)),
                ALLOWED_SIGNS);
    }

    static String names() {
        return quantityNames().stream().collect(Collectors.joining(", "));
    }

    static List<String> quantityNames() {
        return Arrays.stream(PointQuantity.values()).map(PointQuantity::word).toList();
    }

    private Term term(ASTNode node) throws NotAllowedException {
        Token token = node.getToken();
        return switch (token.getType()) {
            case NUMBER_LITERAL -> literal(token.getValue());
            case VARIABLE_OR_CONSTANT -> named(token.getValue());
            case PREFIX_OPERATOR -> signed(token.getValue(), numbers(node).get(0));
            case INFIX_OPERATOR ->
                joined(token.getValue(), numbers(node).get(0), numbers(node).get(1));
            case FUNCTION -> called(token.getValue().toLowerCase(Locale.ROOT), node);
            default ->
                throw new NotAllowedException(
                        "'" + Node.shown(token.getValue()) + "' has no meaning here", ALLOWED_SIGNS);
        };
    }

    private static Term literal(String text) throws NotAllowedException {
        try {
            double value = Double.parseDouble(text);
            if (Double.isFinite(value)) {
                return new Term(false, quantities -> value);
            }
        } catch (NumberFormatException e) {
            throw new NotAllowedException("'" + Node.shown(text) + "' is no decimal number", ALLOWED_SIGNS);
        }
        throw new NotAllowedException("'" + Node.shown(text) + "' is too large a number", ALLOWED_SIGNS);
    }

    private Term named(String name) throws NotAllowedException {
        Double constant = CONSTANTS.get(name.toLowerCase(Locale.ROOT));
        if (constant != null) {
            double value = constant;
            return new Term(false, quantities -> value);
        }
        for (PointQuantity quantity : PointQuantity.values()) {
            if (quantity.word().equals(name)) {
                uses.add(quantity);
                return new Term(false, quantities -> quantities.get(quantity));
            }
        }
        throw new NotAllowedException(
                "no quantity is called '" + Node.shown(name) + "'"
                        + Suggestion.clause(withoutUnit(name), quantityNames()),
                "one of " + names());
    }

    /** Somebody who copies a column's heading has the right quantity in mind. */
    private static String withoutUnit(String name) {
        return quantityNames().stream()
                .filter(word -> name.startsWith(word + "_"))
                .max(Comparator.comparingInt(String::length))
                .orElse(name);
    }

    private List<PointFunction> numbers(ASTNode node) throws NotAllowedException {
        List<PointFunction> values = new java.util.ArrayList<>();
        for (ASTNode operand : node.getParameters()) {
            Term term = term(operand);
            if (term.truth()) {
                throw new NotAllowedException(
                        "'" + Node.shown(operand.getToken().getValue()) + "' compares where a number belongs",
                        "a comparison as the first of the three of if(…, …, …)");
            }
            values.add(term.value());
        }
        return values;
    }

    private static Term signed(String sign, PointFunction operand) {
        return new Term(false, sign.equals("-") ? q -> -operand.valueOf(q) : operand);
    }

    private static Term joined(String sign, PointFunction left, PointFunction right) throws NotAllowedException {
        return switch (sign) {
            case "+" -> new Term(false, q -> left.valueOf(q) + right.valueOf(q));
            case "-" -> new Term(false, q -> left.valueOf(q) - right.valueOf(q));
            case "*" -> new Term(false, q -> left.valueOf(q) * right.valueOf(q));
            case "/" -> new Term(false, q -> left.valueOf(q) / right.valueOf(q));
            case "^" -> new Term(false, q -> Math.pow(left.valueOf(q), right.valueOf(q)));
            case "<" -> new Term(true, q -> left.valueOf(q) < right.valueOf(q) ? 1 : 0);
            case "<=" -> new Term(true, q -> left.valueOf(q) <= right.valueOf(q) ? 1 : 0);
            case ">" -> new Term(true, q -> left.valueOf(q) > right.valueOf(q) ? 1 : 0);
            case ">=" -> new Term(true, q -> left.valueOf(q) >= right.valueOf(q) ? 1 : 0);
            default -> throw new NotAllowedException("'" + sign + "' has no meaning here", ALLOWED_SIGNS);
        };
    }

    /** Angles are in degrees, as in {@code points}. */
    private Term called(String name, ASTNode node) throws NotAllowedException {
        if (name.equals("if")) {
            return choice(node);
        }
        List<PointFunction> given = numbers(node);
        PointFunction x = given.get(0);
        return new Term(
                false,
                switch (name) {
                    case "abs" -> q -> Math.abs(x.valueOf(q));
                    case "sqrt" -> q -> Math.sqrt(x.valueOf(q));
                    case "exp" -> q -> Math.exp(x.valueOf(q));
                    case "ln" -> q -> Math.log(x.valueOf(q));
                    case "log10" -> q -> Math.log10(x.valueOf(q));
                    case "sin" -> q -> Math.sin(Math.toRadians(x.valueOf(q)));
                    case "cos" -> q -> Math.cos(Math.toRadians(x.valueOf(q)));
                    case "tan" -> q -> Math.tan(Math.toRadians(x.valueOf(q)));
                    case "asin" -> q -> Math.toDegrees(Math.asin(x.valueOf(q)));
                    case "acos" -> q -> Math.toDegrees(Math.acos(x.valueOf(q)));
                    case "atan" -> q -> Math.toDegrees(Math.atan(x.valueOf(q)));
                    case "min" ->
                        q -> given.stream()
                                .mapToDouble(value -> value.valueOf(q))
                                .reduce(Math::min)
                                .orElseThrow();
                    case "max" ->
                        q -> given.stream()
                                .mapToDouble(value -> value.valueOf(q))
                                .reduce(Math::max)
                                .orElseThrow();
                    default ->
                        throw new NotAllowedException(
                                "no function is called '" + name + "'",
                                "one of " + String.join(", ", FUNCTIONS.keySet()));
                });
    }

    private Term choice(ASTNode node) throws NotAllowedException {
        List<ASTNode> parts = node.getParameters();
        Term condition = term(parts.get(0));
        if (!condition.truth()) {
            throw new NotAllowedException(
                    "the first part of if is a number", "a comparison, such as if(tan_delta > 1, 1, 0)");
        }
        Term yes = term(parts.get(1));
        Term no = term(parts.get(2));
        if (yes.truth() || no.truth()) {
            throw new NotAllowedException(
                    "a part of if compares where a number belongs", "if(comparison, number, number)");
        }
        return new Term(
                false,
                q -> condition.value().valueOf(q) == 1
                        ? yes.value().valueOf(q)
                        : no.value().valueOf(q));
    }

    /** The library's own declarations say how many parameters each takes. */
    private static Map<String, FunctionIfc> functions() {
        Map<String, FunctionIfc> functions = new TreeMap<>();
        functions.put("abs", new AbsFunction());
        functions.put("sqrt", new SqrtFunction());
        functions.put("exp", new AbsFunction());
        functions.put("ln", new LogFunction());
        functions.put("log10", new Log10Function());
        functions.put("sin", new SinFunction());
        functions.put("cos", new CosFunction());
        functions.put("tan", new TanFunction());
        functions.put("asin", new AsinFunction());
        functions.put("acos", new AcosFunction());
        functions.put("atan", new AtanFunction());
        functions.put("min", new MinFunction());
        functions.put("max", new MaxFunction());
        functions.put("if", new IfFunction());
        return functions;
    }

    private static ExpressionConfiguration language() {
        MapBasedFunctionDictionary known = new MapBasedFunctionDictionary();
        FUNCTIONS.forEach(known::addFunction);
        MapBasedOperatorDictionary signs = new MapBasedOperatorDictionary();
        Map<String, OperatorIfc> operators = Map.of(
                "+", new InfixPlusOperator(),
                "-", new InfixMinusOperator(),
                "*", new InfixMultiplicationOperator(),
                "/", new InfixDivisionOperator(),
                "^", new InfixPowerOfOperator(),
                "<", new InfixLessOperator(),
                "<=", new InfixLessEqualsOperator(),
                ">", new InfixGreaterOperator(),
                ">=", new InfixGreaterEqualsOperator());
        operators.forEach(signs::addOperator);
        signs.addOperator("+", new PrefixPlusOperator());
        signs.addOperator("-", new PrefixMinusOperator());
        return ExpressionConfiguration.builder()
                .functionDictionary(known)
                .operatorDictionary(signs)
                .arraysAllowed(false)
                .structuresAllowed(false)
                .implicitMultiplicationAllowed(false)
                .powerOfPrecedence(OperatorIfc.OPERATOR_PRECEDENCE_POWER_HIGHER) // -x^2 is -(x^2)
                .build();
    }
}
