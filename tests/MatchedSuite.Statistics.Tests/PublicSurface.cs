using System.Globalization;
using System.Reflection;
using System.Runtime.CompilerServices;

namespace MatchedSuite.Statistics.Tests;

/// <summary>The public types and members of an assembly as sorted lines, so that a change of them shows up in review.</summary>
internal static class PublicSurface
{
    private const BindingFlags Declared =
        BindingFlags.Public | BindingFlags.NonPublic | BindingFlags.Instance | BindingFlags.Static | BindingFlags.DeclaredOnly;

    private static readonly Dictionary<Type, string> Keywords = new()
    {
        [typeof(void)] = "void", [typeof(bool)] = "bool", [typeof(byte)] = "byte", [typeof(sbyte)] = "sbyte", [typeof(short)] = "short",
        [typeof(ushort)] = "ushort", [typeof(int)] = "int", [typeof(uint)] = "uint", [typeof(long)] = "long", [typeof(ulong)] = "ulong",
        [typeof(float)] = "float", [typeof(double)] = "double", [typeof(decimal)] = "decimal", [typeof(char)] = "char",
        [typeof(string)] = "string", [typeof(object)] = "object",
    };

    /// <summary>One line for each type, then one for each of its members, indented. Members a record is given by the compiler are left out.</summary>
    public static IEnumerable<string> Of(Assembly assembly)
    {
        foreach (Type type in assembly.GetExportedTypes().OrderBy(FullName, StringComparer.Ordinal))
        {
            yield return $"{Kind(type)} {FullName(type)}{Bases(type)}";
            foreach (string member in Members(type).Distinct().Order(StringComparer.Ordinal))
                yield return "    " + member;
        }
    }

    private static IEnumerable<string> Members(Type type)
    {
        if (type.IsEnum)
            return Enum.GetNames(type).Select(name => $"{name} = {Convert.ToInt64(Enum.Parse(type, name), CultureInfo.InvariantCulture)}");
        if (type.IsSubclassOf(typeof(Delegate)))
            return [Method(type.GetMethod("Invoke")!)];
        return type.GetMembers(Declared).Where(member => !IsGenerated(member)).Select(Line).OfType<string>();
    }

    private static string? Line(MemberInfo member) => member switch
    {
        ConstructorInfo constructor when Seen(constructor) => $"new({Parameters(constructor)})",
        PropertyInfo property when Accessors(property) is { Length: > 0 } accessors => Property(property, accessors),
        FieldInfo field when field.IsPublic || field.IsFamily || field.IsFamilyOrAssembly =>
            $"{(field.IsLiteral ? "const " : field.IsStatic ? "static " : "")}{(field is { IsInitOnly: true } ? "readonly " : "")}{Name(field.FieldType)} {field.Name}",
        EventInfo { AddMethod: { } adder } raised when Seen(adder) => $"event {Name(raised.EventHandlerType!)} {raised.Name}",
        MethodInfo method when Seen(method) && (!method.IsSpecialName || method.Name.StartsWith("op_", StringComparison.Ordinal)) => Method(method),
        _ => null,
    };

    private static string Method(MethodInfo method)
    {
        string generic = method.IsGenericMethod ? $"<{string.Join(", ", method.GetGenericArguments().Select(Name))}>" : "";
        return $"{(method.IsStatic ? "static " : "")}{Name(method.ReturnType)} {method.Name}{generic}({Parameters(method)})";
    }

    private static string Property(PropertyInfo property, MethodInfo[] accessors)
    {
        string index = property.GetIndexParameters() is { Length: > 0 } parameters ? $"[{string.Join(", ", parameters.Select(Parameter))}]" : "";
        return $"{(accessors[0].IsStatic ? "static " : "")}{Name(property.PropertyType)} {property.Name}{index} "
            + $"{{ {string.Join(" ", accessors.Select(accessor => Accessor(property, accessor)))} }}";
    }

    private static string Accessor(PropertyInfo property, MethodInfo accessor) =>
        accessor == property.GetMethod ? "get;"
        : accessor.ReturnParameter.GetRequiredCustomModifiers().Contains(typeof(IsExternalInit)) ? "init;" : "set;";

    private static MethodInfo[] Accessors(PropertyInfo property) =>
        [.. new[] { property.GetMethod, property.SetMethod }.OfType<MethodInfo>().Where(Seen)];

    private static string Parameters(MethodBase method) => string.Join(", ", method.GetParameters().Select(Parameter));

    private static string Parameter(ParameterInfo parameter)
    {
        string passing = !parameter.ParameterType.IsByRef ? "" : parameter.IsOut ? "out " : parameter.IsIn ? "in " : "ref ";
        string fallback = parameter.HasDefaultValue
            ? " = " + Convert.ToString(parameter.DefaultValue ?? "default", CultureInfo.InvariantCulture) : "";
        return $"{passing}{Name(parameter.ParameterType)} {parameter.Name}{fallback}";
    }

    private static bool Seen(MethodBase method) => method.IsPublic || method.IsFamily || method.IsFamilyOrAssembly;

    private static bool IsGenerated(MemberInfo member) =>
        member is not PropertyInfo && member.IsDefined(typeof(CompilerGeneratedAttribute), inherit: false);

    private static string Kind(Type type) =>
        type.IsEnum ? "enum"
        : type.IsInterface ? "interface"
        : type.IsSubclassOf(typeof(Delegate)) ? "delegate"
        : type.IsValueType ? (type.IsByRefLike ? "ref struct" : "struct")
        : type is { IsAbstract: true, IsSealed: true } ? "static class"
        : type.IsAbstract ? "abstract class"
        : type.IsSealed ? "sealed class" : "class";

    private static string Bases(Type type)
    {
        if (type.IsEnum || type.IsSubclassOf(typeof(Delegate)))
            return "";
        var bases = new[] { type.BaseType }.OfType<Type>().Where(ancestor => ancestor != typeof(object) && ancestor != typeof(ValueType))
            .Concat(type.GetInterfaces().Where(contract => contract.IsPublic)).Select(Name).Order(StringComparer.Ordinal).ToArray();
        return bases.Length == 0 ? "" : " : " + string.Join(", ", bases);
    }

    private static string FullName(Type type) => $"{(type.IsNested ? FullName(type.DeclaringType!) : type.Namespace)}.{Name(type)}";

    private static string Name(Type type)
    {
        if (Keywords.TryGetValue(type, out string? keyword))
            return keyword;
        if (type.IsByRef)
            return Name(type.GetElementType()!);
        if (type.IsArray)
            return $"{Name(type.GetElementType()!)}[{new string(',', type.GetArrayRank() - 1)}]";
        if (Nullable.GetUnderlyingType(type) is { } underlying)
            return Name(underlying) + "?";
        int mark = type.Name.IndexOf('`', StringComparison.Ordinal);
        return mark < 0 ? type.Name : $"{type.Name[..mark]}<{string.Join(", ", type.GetGenericArguments().Select(Name))}>";
    }
}
